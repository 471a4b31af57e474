import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { newId } from '../../shared/kernel/ids';
import { endDueDrying } from '../../server/modules/travellers';
import { seedInstallation, seedPerson, signedInClient } from '../support/fixtures';
import { seedTraveller } from '../support/fixtures-steps';
import { startTestServer, type TestClient, type TestServer } from '../support/test-server';

let server: TestServer;
let installationId: string;
let glueId: string;
let paintId: string;

beforeEach(async () => {
  server = await startTestServer();
  ({ installationId, glueId, paintId } = await seedInstallation(server.app));
});
afterEach(() => server.close());

interface Person {
  id: string;
  client: TestClient;
}
async function person(wish: Parameters<typeof seedPerson>[2] = {}): Promise<Person> {
  const id = await seedPerson(server.app, installationId, wish);
  return { id, client: await signedInClient(server, id) };
}
const checker = () => person({ duties: ['volunteer', 'checker'] });
const does = ({ client }: Person, stepId: string, command: string, body: object = {}, key?: string) =>
  client.post<{ revision: number; flags: string[] }>(
    `/installations/${installationId}/steps/${stepId}/${command}`,
    body,
    key,
  );
const row = async (stepId: string) => {
  const rows = await server.app.deps.data.writer.query<Record<string, unknown>[]>(
    'SELECT * FROM step WHERE id = ?',
    [stepId],
  );
  return rows[0] ?? {};
};
const log = (stepId: string) =>
  server.app.deps.data.writer.query<
    { action: string; actor: string; flags: string; happened_at: number; recorded_at: number }[]
  >(
    `SELECT action, actor, flags, happened_at, recorded_at FROM day_log WHERE json_extract(subject, '$.stepId') = ? ORDER BY seq`,
    [stepId],
  );
const one = async (...steps: Parameters<typeof seedTraveller>[3]) =>
  (await seedTraveller(server.app, installationId, glueId, steps)).stepIds as [string, ...string[]];

describe('claimStep', () => {
  it('claimStep > a free step > taken: reply, row, place, day log', async () => {
    const wren = await person();
    const [step] = await one({});
    const reply = await does(wren, step, 'claim');
    expect(reply).toMatchObject({
      status: 200,
      data: { stepId: step, event: 'step.claimed', flags: [], warnings: [] },
    });
    expect(await row(step)).toMatchObject({ state: 'in hand', revision: reply.data.revision });
    expect(await log(step)).toMatchObject([{ action: 'step.claimed', actor: `person:${wren.id}` }]);
  });

  it('claimStep > somebody who was not briefed for hot glue > refused with SIGN_OFF_MISSING, the step stays free', async () => {
    const wren = await person();
    const [step] = await one({ hazards: ['hot-glue'] });
    const reply = await does(wren, step, 'claim');
    expect(reply).toMatchObject({
      status: 409,
      error: { code: 'SIGN_OFF_MISSING', details: { hazard: 'hot-glue', missing: 'NOT_READ' } },
    });
    expect(await row(step)).toMatchObject({ state: 'ready' });
    expect(await log(step)).toEqual([]);
  });

  it('claimStep > two people at once on one place > one has it, the other is told who', async () => {
    const [wren, kofi] = [await person(), await person()];
    const [step] = await one({});
    const replies = await Promise.all([does(wren, step, 'claim'), does(kofi, step, 'claim')]);
    const winner = replies[0].status === 200 ? wren : kofi;
    const loser = replies.find(({ status }) => status !== 200);
    expect(loser).toMatchObject({
      status: 409,
      error: { code: 'STEP_CREW_FULL', details: { crew: [winner.id], places: 1 } },
    });
  });

  it('claimStep > the third step of one person > refused with IN_HAND_LIMIT and the number', async () => {
    const wren = await person();
    const steps = [await one({}), await one({}), await one({})].map(([step]) => step);
    await does(wren, steps[0]!, 'claim');
    await does(wren, steps[1]!, 'claim');
    expect(await does(wren, steps[2]!, 'claim')).toMatchObject({
      error: { code: 'IN_HAND_LIMIT', details: { limit: 2 } },
    });
  });

  it('claimStep > somebody the desk has not confirmed > refused with PERSON_NOT_CONFIRMED', async () => {
    const wren = await person({ confirmed: false });
    const [step] = await one({});
    expect(await does(wren, step, 'claim')).toMatchObject({
      status: 409,
      error: { code: 'PERSON_NOT_CONFIRMED' },
    });
  });

  it('claimStep > the same key a day later > the first answer, no second effect', async () => {
    const wren = await person();
    const [step] = await one({});
    const key = newId();
    const first = await does(wren, step, 'claim', {}, key);
    await does(wren, step, 'give-back');
    server.clock.advance(20 * 3600_000);
    const again = await does(wren, step, 'claim', {}, key);
    expect(again).toMatchObject({ status: 200, data: first.data });
    expect(again.headers['idempotent-replay']).toBe('true');
    expect(await row(step)).toMatchObject({ state: 'ready' });
    expect((await log(step)).map(({ action }) => action)).toEqual(['step.claimed', 'step.given-back']);
  });

  it('claimStep > kept on a phone for more than two minutes > refused with OFFLINE_CLAIM_EXPIRED', async () => {
    const wren = await person();
    const [step] = await one({});
    expect(await does(wren, step, 'claim', { queuedMs: 119_000 })).toMatchObject({ status: 200 });
    await does(wren, step, 'give-back');
    expect(await does(wren, step, 'claim', { queuedMs: 121_000 })).toMatchObject({
      status: 409,
      error: { code: 'OFFLINE_CLAIM_EXPIRED' },
    });
  });

  it('claimStep > an unknown step, and a step of another installation > both answered alike, as an unknown address', async () => {
    const wren = await person();
    const other = await seedInstallation(server.app);
    const [foreign] = (await seedTraveller(server.app, other.installationId, other.glueId, [{}])).stepIds as [
      string,
    ];
    const replies = [await does(wren, newId(), 'claim'), await does(wren, foreign, 'claim')];
    expect(replies.map(({ status, error }) => [status, error?.code, error?.message])).toEqual([
      [404, 'NOT_FOUND', replies[0]?.error?.message],
      [404, 'NOT_FOUND', replies[0]?.error?.message],
    ]);
  });

  it('claimStep > a closed installation, a draft > told so', async () => {
    const wren = await person();
    const [step] = await one({});
    const set = (status: string) =>
      server.app.deps.data.writer.query('UPDATE installation SET status = ? WHERE id = ?', [
        status,
        installationId,
      ]);
    await set('closed');
    expect(await does(wren, step, 'claim')).toMatchObject({ error: { code: 'INSTALLATION_CLOSED' } });
    await set('draft');
    expect(await does(wren, step, 'claim')).toMatchObject({ error: { code: 'INSTALLATION_NOT_PUBLISHED' } });
  });
});

describe('a step from hand to hand', () => {
  it('check > A starts, B finishes after a hand-over > the check of A is refused, of B too, a third person passes it', async () => {
    const [a, b, c] = [await checker(), await checker(), await checker()];
    const [step, next] = (await one({ needsCheck: 1 }, {})) as [string, string];
    await does(a, step, 'claim');
    await does(a, step, 'start');
    await does(a, step, 'offer', { to: b.id });
    expect(await does(c, step, 'accept')).toMatchObject({ error: { code: 'HAND_OVER_NOT_OFFERED' } });
    expect(await does(b, step, 'accept')).toMatchObject({ status: 200 });
    expect(await does(a, step, 'finish')).toMatchObject({ error: { code: 'STEP_NOT_YOURS' } });
    expect(await does(b, step, 'finish')).toMatchObject({ status: 200 });
    expect(await row(step)).toMatchObject({ state: 'to check', finished_by: b.id });
    expect(await does(a, step, 'pass')).toMatchObject({ status: 409, error: { code: 'CHECKER_DID_WORK' } });
    expect(await does(b, step, 'pass')).toMatchObject({ error: { code: 'CHECKER_DID_WORK' } });
    expect(await does(c, step, 'pass')).toMatchObject({ status: 200 });
    expect(await row(step)).toMatchObject({ state: 'passed', passed_by: c.id });
    expect(await row(next)).toMatchObject({ state: 'ready' });
  });

  it('check > by somebody without the duty > refused with NOT_ALLOWED, naming who may', async () => {
    const [wren, kofi] = [await person(), await person()];
    const [step] = await one({ needsCheck: 1 });
    await does(wren, step, 'claim');
    await does(wren, step, 'start');
    await does(wren, step, 'finish');
    const reply = await does(kofi, step, 'pass');
    expect(reply).toMatchObject({ status: 403, error: { code: 'NOT_ALLOWED' } });
    expect(reply.error?.message).toContain('bench lead');
  });

  it('hand-over > to somebody without a sign-off for its hazard > refused like a claim, the step stays where it is', async () => {
    const [a, b] = [await person(), await person()];
    const [step] = await one({});
    await does(a, step, 'claim');
    await server.app.deps.data.writer.query(`UPDATE step SET hazards = '["hot-glue"]' WHERE id = ?`, [step]);
    await does(a, step, 'offer', { to: b.id });
    expect(await does(b, step, 'accept')).toMatchObject({ error: { code: 'SIGN_OFF_MISSING' } });
    const holders = await server.app.deps.data.writer.query(
      'SELECT person_id FROM claim WHERE step_id = ? AND ended_at IS NULL',
      [step],
    );
    expect(holders).toEqual([{ person_id: a.id }]);
  });

  it('rework > with a reason to an earlier step > that one is open again, later ones wait, the reason is on the row and in the log', async () => {
    const [a, c] = [await person(), await checker()];
    const [first, second, third] = (await one({}, { needsCheck: 1 }, {})) as [string, string, string];
    for (const step of [first, second]) {
      await does(a, step, 'claim');
      await does(a, step, 'start');
      await does(a, step, 'finish');
    }
    expect(await does(c, second, 'rework', { reason: '', targetId: first })).toMatchObject({
      status: 400,
      error: { code: 'VALIDATION', fields: [{ path: 'reason' }] },
    });
    expect(await does(c, second, 'rework', { reason: 'joint 6 is open', targetId: third })).toMatchObject({
      error: { code: 'REWORK_TARGET' },
    });
    expect(await does(c, second, 'rework', { reason: 'joint 6 is open', targetId: first })).toMatchObject({
      status: 200,
    });
    expect(await row(first)).toMatchObject({ state: 'rework' });
    expect(JSON.parse((await row(first)).rework as string)).toMatchObject({
      reason: 'joint 6 is open',
      by: c.id,
    });
    expect(await row(second)).toMatchObject({ state: 'waiting' });
    expect((await log(second)).at(-1)).toMatchObject({ action: 'step.sent-to-rework' });
  });

  it('hold > on a step in hand > finishing is refused until it is released, then goes on where it was', async () => {
    const [a, lead] = [await person(), await person({ duties: ['volunteer', 'bench lead'] })];
    const [step] = await one({});
    await does(a, step, 'claim');
    await does(a, step, 'start');
    await does(lead, step, 'hold', { reason: 'the gun drips' });
    expect(await does(a, step, 'finish')).toMatchObject({
      error: { code: 'STEP_HELD', details: { reason: 'the gun drips', by: lead.id } },
    });
    await does(lead, step, 'release', { note: 'another gun' });
    expect(await does(a, step, 'finish')).toMatchObject({ status: 200 });
    expect(await row(step)).toMatchObject({ state: 'passed' });
  });
});

describe('what already happened', () => {
  it('finish > made off the network under a hold > never refused, flagged, and unlocks nothing by itself', async () => {
    const [a, lead] = [await person(), await person({ duties: ['volunteer', 'bench lead'] })];
    const [step, next] = (await one({}, {})) as [string, string];
    await does(a, step, 'claim');
    await does(a, step, 'start');
    await does(lead, step, 'hold', { reason: 'the gun drips' });
    server.clock.advance(600_000);
    const reply = await does(a, step, 'finish', { queuedMs: 240_000 });
    expect(reply).toMatchObject({ status: 200, data: { flags: ['STEP_HELD'] } });
    expect(await row(step)).toMatchObject({ state: 'to check' });
    expect(await row(next)).toMatchObject({ state: 'waiting' });
    const entry = (await log(step)).at(-1);
    expect(entry).toMatchObject({ action: 'step.finished', flags: '["STEP_HELD"]' });
    expect((entry?.recorded_at ?? 0) - (entry?.happened_at ?? 0)).toBe(240_000);
  });

  it('record > typed in from paper for a step that waits > flagged, its crew are doers, a second person still has to pass it', async () => {
    const [a, c, lead] = [
      await checker(),
      await checker(),
      await person({ duties: ['volunteer', 'bench lead'] }),
    ];
    const [first, second] = (await one({}, {})) as [string, string];
    const reply = await does(lead, second, 'record', { crew: [a.id], minutesAgo: 30 });
    expect(reply).toMatchObject({ status: 200, data: { flags: ['RECORDED_FROM_PAPER', 'STEP_NOT_READY'] } });
    expect(await row(first)).toMatchObject({ state: 'ready' });
    expect(await does(a, second, 'pass')).toMatchObject({ error: { code: 'CHECKER_DID_WORK' } });
    expect(await does(c, second, 'pass')).toMatchObject({ error: { code: 'STEP_NOT_READY' } });
  });
});

describe('drying', () => {
  it('drying clock > runs out > the server ends it, logs it as its own doing, and the next step opens', async () => {
    const a = await person();
    const { stepIds } = await seedTraveller(server.app, installationId, paintId, [
      { operation: 'coat', clocks: { touchDry: 1800, hangFrom: 3600 } },
      { operation: 'hang' },
    ]);
    const [coat, hang] = stepIds as [string, string];
    await does(a, coat, 'claim');
    await does(a, coat, 'start');
    await does(a, coat, 'finish');
    expect(await row(coat)).toMatchObject({ state: 'drying' });
    server.clock.advance(1_799_000);
    expect(await endDueDrying(server.app.deps)).toBe(0);
    server.clock.advance(1000);
    expect(await endDueDrying(server.app.deps)).toBe(1);
    expect(await row(coat)).toMatchObject({ state: 'passed' });
    expect((await log(coat)).at(-1)).toMatchObject({ action: 'step.dried', actor: 'server' });
    expect(await does(a, hang, 'claim')).toMatchObject({
      error: { code: 'STEP_CLOCK_RUNNING', details: { clock: 'hangFrom' } },
    });
    server.clock.advance(1_800_000);
    expect(await does(a, hang, 'claim')).toMatchObject({ status: 200 });
  });

  it('still wet > said at one piece > every piece in the bay dries longer, and the next step closes again', async () => {
    const [a, b] = [await person(), await person()];
    const coatStep = { operation: 'coat', clocks: { touchDry: 1800 } };
    const pieces = await Promise.all(
      [0, 1].map(() => seedTraveller(server.app, installationId, paintId, [coatStep, {}])),
    );
    const [[one1, after], [two]] = pieces.map(({ stepIds }) => stepIds) as [[string, string], [string]];
    for (const [who, step] of [
      [a, one1],
      [b, two],
    ] as const) {
      await does(who, step, 'claim');
      await does(who, step, 'start');
      await does(who, step, 'finish');
      server.clock.advance(600_000);
    }
    server.clock.advance(700_000);
    await endDueDrying(server.app.deps);
    expect(await row(after)).toMatchObject({ state: 'ready' });
    const until = Number((await row(two)).dry_until);
    expect(await does(a, one1, 'still-wet', { minutes: 20 })).toMatchObject({ status: 200 });
    expect(await row(one1)).toMatchObject({ state: 'drying' });
    expect(await row(after)).toMatchObject({ state: 'waiting' });
    expect(Number((await row(two)).dry_until)).toBe(until + 1_200_000);
  });
});

describe('stop', () => {
  it('stop > of hot tools > a hot-glue step can be neither claimed nor started nor finished, another step can; lifted, it goes on', async () => {
    const [a, lead] = [await person(), await person({ duties: ['volunteer', 'safety lead'] })];
    const [hot] = await one({});
    const [cold] = await one({});
    await does(a, hot, 'claim');
    await does(a, hot, 'start');
    await server.app.deps.data.writer.query(`UPDATE step SET hazards = '["hot-glue"]' WHERE id = ?`, [hot]);
    const raised = await a.client.post<{ stopId?: string; id?: string }>(
      `/installations/${installationId}/stops`,
      { scope: 'hot-tools', reason: 'smoke at glue 2' },
    );
    expect(raised.status).toBeLessThan(300);
    expect(await does(a, hot, 'finish')).toMatchObject({ status: 409, error: { code: 'STOP_ACTIVE' } });
    expect(await does(a, cold, 'claim')).toMatchObject({ status: 200 });
    const rows = await server.app.deps.data.writer.query<{ id: string }[]>('SELECT id FROM stop');
    const lift = `/installations/${installationId}/stops/${rows[0]?.id ?? ''}/lift`;
    expect(await a.client.post(lift, { note: 'it was dust' })).toMatchObject({
      status: 403,
      error: { code: 'NOT_ALLOWED' },
    });
    expect(await lead.client.post(lift, { note: 'a rag lay on the plate; gone' })).toMatchObject({
      status: 200,
    });
    expect(await does(a, hot, 'finish')).toMatchObject({ status: 200 });
  });
});
