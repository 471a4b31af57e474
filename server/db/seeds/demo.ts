import type { AddressInfo } from 'node:net';
import type { BriefingTextView } from '../../../shared/contracts/safety';
import type { SessionView, Snapshot } from '../../../shared/contracts/live';
import type { DisplayTokenView, JoinCodeView } from '../../../shared/contracts/installations';
import { manualClock } from '../../../shared/kernel/clock';
import { seededRandom } from '../../../shared/kernel/random';
import { HOT_GLUE_BODY, HOT_GLUE_BRIEFING } from '../../../shared/safety';
import { createApp, type App } from '../../app';
import type { Config } from '../../config';
import { createAccount, hashPassword } from '../../modules/accounts';
import { endDueDrying } from '../../modules/travellers';
import { SERVER_ACTOR } from '../write';
import { DemoClient } from './demo-client';
import { playMorning, type Worker } from './demo-morning';
import { planHall } from './demo-plan';
import {
  DEMO_NOW,
  DEMO_PASSWORD,
  MEMBERS,
  onTheDay,
  PLANNING_FROM,
  TOOLS,
  VOLUNTEERS,
} from './demo-scenario';

/** What somebody needs to look round in the demo. */
export interface DemoHall {
  installationId: string;
  joinCode: string;
  /** Stands in the projector's address and nowhere else. */
  projectorToken: string;
}

const MINUTE = 60_000;

/**
 * Make the demo on an empty database, over the same routes as real data and under the demo's own clock: an organiser
 * plans in May, people come in on the build day, and the morning is played until the clock stands at `DEMO_NOW`.
 * @param config of the server that will serve it; its port is not used
 * @returns ids and addresses to print
 */
export async function seedDemo(config: Config): Promise<DemoHall> {
  const clock = manualClock(PLANNING_FROM);
  const app = await createApp(
    { ...config, TLS_CERT: undefined, TLS_KEY: undefined, LOG_LEVEL: 'error' },
    clock,
  );
  try {
    await new Promise<void>((resolve) => app.http.listen(0, '127.0.0.1', resolve));
    const { port } = app.http.address() as AddressInfo;
    return await new Seeder(app, clock, `http://127.0.0.1:${port}`).run();
  } finally {
    await app.close();
  }
}

interface Person {
  personId: string;
  client: DemoClient;
}

class Seeder {
  private readonly members = new Map<string, Person>();
  private readonly volunteers = new Map<string, Person>();
  private installationId = '';

  constructor(
    private readonly app: App,
    private readonly clock: ReturnType<typeof manualClock>,
    private readonly url: string,
  ) {}

  async run(): Promise<DemoHall> {
    await this.makeAccounts();
    const organiser = await this.signIn('ines@pumphall.example');
    this.installationId = await planHall(organiser);
    for (const member of MEMBERS.slice(1)) {
      const { firstName, initial, email, duties } = member;
      await organiser.post(this.path('/people'), { firstName, initial, email, duties });
    }
    for (const tool of TOOLS) await organiser.post(this.path('/tools'), tool);
    await organiser.post(this.path('/publish'));
    const projector = await organiser.post<DisplayTokenView>(this.path('/displays'), { label: 'north wall' });
    const join = await organiser.get<JoinCodeView>(this.path('/join-code'));
    await this.openDoors(join.joinCode);
    await this.brief();
    await this.lendGuns();
    await playMorning({
      installationId: this.installationId,
      lead: this.member('ines').client,
      workers: this.workers(),
      setClock: (at) => this.clock.set(at),
      endDrying: () => endDueDrying(this.app.deps),
      random: seededRandom(20270612),
    });
    this.clock.set(DEMO_NOW);
    await this.leaveSomeTroubles();
    return {
      installationId: this.installationId,
      joinCode: join.joinCode,
      projectorToken: projector.url?.split('#')[1] ?? '',
    };
  }

  private path = (rest: string) => `/installations/${this.installationId}${rest}`;

  private async makeAccounts(): Promise<void> {
    const passwordHash = await hashPassword(DEMO_PASSWORD);
    for (const { email, firstName, initial, siteRole } of MEMBERS) {
      await this.app.deps.writer.runPlain({ maker: SERVER_ACTOR, installationId: null }, (scope) =>
        createAccount(scope, { email, name: `${firstName} ${initial}`, siteRole, passwordHash }),
      );
    }
  }

  private async signIn(email: string): Promise<DemoClient> {
    const client = new DemoClient(this.url);
    await client.post('/session', { email, password: DEMO_PASSWORD });
    return client;
  }

  /** Members sign in, then everybody comes in by the poster's code and passes the desk. */
  private async openDoors(code: string): Promise<void> {
    this.clock.set(onTheDay(9, 0));
    for (const { email, firstName } of MEMBERS) {
      const client = await this.signIn(email);
      const session = await client.get<SessionView>('/session');
      const { principal } = session;
      const place = principal?.kind === 'account' ? principal.installations[0] : undefined;
      if (!place?.personId) throw new Error(`${email} has no place in the demo`);
      this.members.set(firstName.toLowerCase(), { client, personId: place.personId });
    }
    // The organiser opens the desk; from then on the desk confirms.
    for (const name of ['marta', 'lena', 'noor', 'goran', 'cleo'])
      await this.confirm('ines', this.member(name).personId, '18+');
    for (const { firstName, initial, ageBand, adultName, stage, duties } of VOLUNTEERS) {
      this.clock.advance(0.8 * MINUTE);
      const client = new DemoClient(this.url);
      const view = await client.post<SessionView>('/join', {
        code,
        firstName,
        initial,
        ageBand,
        ...(adultName ? { adultName } : {}),
      });
      const personId = view.principal?.kind === 'person' ? view.principal.personId : '';
      this.volunteers.set(firstName, { client, personId });
      if (stage === 'door') continue;
      await this.confirm('marta', personId, ageBand);
      for (const duty of duties ?? []) {
        await this.member('ines').client.send('PUT', this.path(`/people/${personId}/duties`), {
          duty,
          on: true,
        });
      }
    }
  }

  private confirm(by: string, personId: string, ageBand: string): Promise<unknown> {
    return this.member(by).client.post(this.path(`/people/${personId}/confirm`), { ageBand });
  }

  /** The first half hour: everybody who glues is briefed, signs and is countersigned. */
  private async brief(): Promise<void> {
    this.clock.set(onTheDay(9, 32));
    const leads = [this.member('lena'), this.member('noor')] as const;
    await this.signBriefing(leads[0], 'Lena W', leads[1]);
    await this.signBriefing(leads[1], 'Noor A', leads[0]);
    for (const { firstName, initial, stage } of VOLUNTEERS) {
      if (stage !== 'briefed' && stage !== 'signed') continue;
      this.clock.advance(0.3 * MINUTE);
      await this.signBriefing(
        this.volunteer(firstName),
        `${firstName} ${initial}`,
        stage === 'briefed' ? leads[0] : null,
      );
    }
  }

  private async signBriefing(person: Person, name: string, lead: Person | null): Promise<void> {
    const path = this.path(`/briefings/${HOT_GLUE_BRIEFING.key}`);
    const { version } = await person.client.get<BriefingTextView>(path);
    const answers = Object.fromEntries(HOT_GLUE_BODY.questions.map(({ id, right }) => [id, right]));
    await person.client.post(`${path}/answers`, { version, answers });
    const { signOffId } = await person.client.post<{ signOffId: string }>(`${path}/sign`, {
      version,
      signature: { kind: 'typed', value: name },
    });
    if (lead) await lead.client.post(this.path(`/sign-offs/${signOffId}/countersign`));
  }

  /** The crib hands out a gun to everybody who glues, and a few other tools. */
  private async lendGuns(): Promise<void> {
    this.clock.set(onTheDay(9, 46));
    const numbers = await this.toolIds();
    const out: [string, string, number][] = [
      ...VOLUNTEERS.filter(({ glue }) => glue).map(({ firstName }, index): [string, string, number] => [
        `G-${String(index + 1).padStart(2, '0')}`,
        firstName,
        index < 2 ? 240 : 330 + index * 15,
      ]),
      ['S-01', 'Abe', 330],
      ['N-02', 'Ilse', 400],
      ['K-01', 'Olu', 435],
      ['C-01', 'Bea', 290],
    ];
    for (const [number, firstName, minutes] of out) {
      this.clock.advance(0.2 * MINUTE);
      await this.member('cleo').client.post(this.path(`/tools/${numbers.get(number) ?? ''}/lend`), {
        personId: this.volunteer(firstName).personId,
        stationId: null,
        minutes,
      });
    }
  }

  private async toolIds(): Promise<Map<string, string>> {
    const snapshot = await this.member('ines').client.get<Snapshot>(this.path('/live'));
    return new Map(snapshot.records.tools.map((tool) => [tool.number, tool.id]));
  }

  private workers(): Worker[] {
    const volunteers = VOLUNTEERS.filter(({ stage, ageBand }) => stage !== 'door' && ageBand !== '9-12').map(
      ({ firstName, glue, duties }): Worker => ({
        ...this.volunteer(firstName),
        glue: glue === true,
        checks: duties?.includes('checker') === true,
      }),
    );
    const leads = ['noor', 'goran'].map((name): Worker => ({
      ...this.member(name),
      glue: false,
      checks: true,
    }));
    return [...leads.slice(1), ...volunteers, ...leads.slice(0, 1)];
  }

  /** A drip, a wobble and a hold: a day without any would be no day. */
  private async leaveSomeTroubles(): Promise<void> {
    const { client } = this.member('lena');
    const numbers = await this.toolIds();
    const tag = (number: string, reason: string) =>
      client.post(this.path(`/tools/${numbers.get(number) ?? ''}/tag`), { reason });
    await tag('G-10', 'Drips at the nozzle when upright.');
    await tag('C-04', 'The chuck does not hold.');
    await tag('K-03', 'One foot is missing.');
    const snapshot = await client.get<Snapshot>(this.path('/live'));
    const checked = snapshot.records.steps.filter(
      (step) =>
        step.state === 'in hand' && step.needsCheck && step.clocks === null && step.startedAt !== null,
    );
    for (const [index, step] of checked.entries()) {
      const crew = this.people().find((person) => person.personId === step.crew[0]?.personId);
      if (!crew || index > 1) continue;
      await crew.client.post(this.path(`/steps/${step.id}/finish`));
      const reason = 'joint 6 is open';
      if (index === 0)
        await this.member('goran').client.post(this.path(`/steps/${step.id}/rework`), {
          reason,
          targetId: step.id,
        });
    }
    const codes = new Map(snapshot.records.subAssemblies.map((piece) => [piece.id, piece.code]));
    const held = snapshot.records.steps
      .filter((step) => step.state === 'ready')
      .sort((a, b) => (codes.get(a.subAssemblyId) ?? '').localeCompare(codes.get(b.subAssemblyId) ?? ''))
      .at(-1);
    if (held)
      await client.post(this.path(`/steps/${held.id}/hold`), {
        reason: 'two struts are split, new ones are being cut',
      });
  }

  private people(): Person[] {
    return [...this.members.values(), ...this.volunteers.values()];
  }

  private member(name: string): Person {
    const member = this.members.get(name);
    if (!member) throw new Error(`no member ${name}`);
    return member;
  }

  private volunteer(firstName: string): Person {
    const volunteer = this.volunteers.get(firstName);
    if (!volunteer) throw new Error(`no volunteer ${firstName}`);
    return volunteer;
  }
}
