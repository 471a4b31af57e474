import type { DayLogRow } from '../../server/db/plumbing.entity';
import { HOT_GLUE_BODY, type Answers, type Hazard } from '../../shared/safety';
import { newId } from '../../shared/kernel/ids';
import { inScope, seedInstallation, seedPerson, signedInClient } from './fixtures';
import { startTestServer, type TestClient, type TestServer } from './test-server';

/** Every question of the shipped sheet answered rightly, except the given ones. */
export const answersWith = (wrongIds: readonly string[] = []): Answers =>
  Object.fromEntries(
    HOT_GLUE_BODY.questions.map(({ id, right, options }) => [
      id,
      wrongIds.includes(id) ? (options.find((option) => option.id !== right)?.id ?? '') : right,
    ]),
  );

export const TYPED = { kind: 'typed', value: 'Ines Koval' } as const;

/** A hall with two safety leads, an organiser and a volunteer, each with a browser. */
export interface Hall {
  server: TestServer;
  installationId: string;
  glueId: string;
  paintId: string;
  base: string;
  leadId: string;
  secondId: string;
  organiserId: string;
  inesId: string;
  lead: TestClient;
  second: TestClient;
  organiser: TestClient;
  ines: TestClient;
}

export async function openHall(): Promise<Hall> {
  const server = await startTestServer();
  const { app } = server;
  const stations = await seedInstallation(app);
  const { installationId } = stations;
  const leadId = await seedPerson(app, installationId, {
    firstName: 'Lena',
    initial: 'M',
    duties: ['safety lead'],
  });
  const secondId = await seedPerson(app, installationId, {
    firstName: 'Rui',
    initial: 'S',
    duties: ['safety lead'],
  });
  const organiserId = await seedPerson(app, installationId, {
    firstName: 'Olga',
    initial: 'T',
    duties: ['organiser'],
  });
  const inesId = await seedPerson(app, installationId);
  return {
    server,
    ...stations,
    base: `/installations/${installationId}`,
    leadId,
    secondId,
    organiserId,
    inesId,
    lead: await signedInClient(server, leadId),
    second: await signedInClient(server, secondId),
    organiser: await signedInClient(server, organiserId),
    ines: await signedInClient(server, inesId),
  };
}

/** Answer rightly and sign. @returns the sign-off's id */
export async function signs(hall: Hall, client: TestClient, version = 1): Promise<string> {
  const path = `${hall.base}/briefings/hot-glue`;
  hall.server.clock.advance(1000);
  const answered = await client.post(`${path}/answers`, { version, answers: answersWith() });
  if (answered.status !== 200) throw new Error(answered.text);
  const signed = await client.post<{ signOffId: string }>(`${path}/sign`, { version, signature: TYPED });
  if (signed.status !== 200) throw new Error(signed.text);
  return signed.data.signOffId;
}

/** Sign, and have a lead countersign. @returns the sign-off's id */
export async function signsOff(
  hall: Hall,
  client: TestClient,
  lead: TestClient = hall.lead,
): Promise<string> {
  const signOffId = await signs(hall, client);
  const reply = await lead.post(`${hall.base}/sign-offs/${signOffId}/countersign`);
  if (reply.status !== 200) throw new Error(reply.text);
  return signOffId;
}

/** Rows of a table of the hall's installation, as stored. */
export const stored = <T>(hall: Hall, sql: string, ...params: unknown[]): Promise<T[]> =>
  hall.server.app.deps.data.writer.query<T[]>(sql, [hall.installationId, ...params]);

/** Entries of the day log with one action, oldest first. */
export const logged = async (
  hall: Hall,
  action: string,
): Promise<
  (Pick<DayLogRow, 'actor' | 'subject' | 'flags'> & { forPersonId: string | null; revision: number })[]
> =>
  (
    await stored<{
      actor: string;
      for_person_id: string | null;
      subject: string;
      flags: string;
      revision: number;
    }>(
      hall,
      'SELECT actor, for_person_id, subject, flags, revision FROM day_log WHERE installation_id = ? AND action = ? ORDER BY seq',
      action,
    )
  ).map((row) => ({
    actor: row.actor,
    forPersonId: row.for_person_id,
    subject: JSON.parse(row.subject) as Record<string, unknown>,
    flags: JSON.parse(row.flags) as string[],
    revision: row.revision,
  }));

/** A place in hand on a step, straight into the tables. */
export async function holdsStep(
  hall: Hall,
  personId: string,
  hazards: readonly Hazard[] = ['hot-glue'],
): Promise<string> {
  const stepId = newId();
  await inScope(hall.server.app, hall.installationId, async ({ manager, now }) => {
    await manager.query(
      `INSERT INTO step (id, installation_id, sub_assembly_id, position, operation, name, station_id, hazards, tool_kinds,
         crew_min, crew_max, planned_seconds, needs_check, state, flags, revision)
       VALUES (?, ?, 'piece', 1, 'tack', 'tack', ?, ?, '[]', 1, 1, 600, 0, 'in hand', '[]', 1)`,
      [stepId, hall.installationId, hall.glueId, JSON.stringify(hazards)],
    );
    await manager.query(
      'INSERT INTO claim (id, installation_id, step_id, person_id, claimed_at) VALUES (?, ?, ?, ?, ?)',
      [newId(), hall.installationId, stepId, personId, now],
    );
  });
  return stepId;
}
