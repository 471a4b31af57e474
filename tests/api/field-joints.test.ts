import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { Board } from '../support/board';
import { seedInstallation, seedPerson, signedInClient } from '../support/fixtures';
import { seedTraveller } from '../support/fixtures-steps';
import { startTestServer, type TestClient, type TestServer } from '../support/test-server';

let server: TestServer;
let installationId: string;
let left: { pieceId: string; stepIds: string[] };
let right: { pieceId: string; stepIds: string[] };
let joint: { pieceId: string; stepIds: string[] };
let wren: TestClient;
let checker: TestClient;
let checkerId: string;

beforeEach(async () => {
  server = await startTestServer();
  const hall = await seedInstallation(server.app);
  ({ installationId } = hall);
  const piece = (code: string) =>
    seedTraveller(server.app, installationId, hall.glueId, [{}, { needsCheck: 1 }], code);
  left = await piece('V-01');
  right = await piece('V-02');
  joint = await seedTraveller(
    server.app,
    installationId,
    hall.glueId,
    [{ state: 'waiting', name: 'Join' }],
    'J-01',
    { kind: 'field joint', needs: [left.pieceId, right.pieceId] },
  );
  wren = await signedInClient(server, await seedPerson(server.app, installationId));
  checkerId = await seedPerson(server.app, installationId, { duties: ['volunteer', 'bench lead'] });
  checker = await signedInClient(server, checkerId);
});
afterEach(() => server.close());

const asks = (client: TestClient, stepId: string | undefined, command: string, body: object = {}) =>
  client.post<{ revision: number }>(
    `/installations/${installationId}/steps/${stepId ?? ''}/${command}`,
    body,
  );

async function state(stepId: string | undefined): Promise<{ state: string; revision: number }> {
  const rows = await server.app.deps.data.writer.query<{ state: string; revision: number }[]>(
    'SELECT state, revision FROM step WHERE id = ?',
    [stepId],
  );
  return rows[0] ?? { state: 'gone', revision: 0 };
}

async function does(stepId: string | undefined): Promise<void> {
  for (const command of ['claim', 'start', 'finish'])
    expect((await asks(wren, stepId, command)).status).toBe(200);
}
/** Work a piece through and have it checked; answers with the revision of the last change. */
async function passes({ stepIds }: typeof left): Promise<number> {
  await does(stepIds[0]);
  await does(stepIds[1]);
  const reply = await asks(checker, stepIds[1], 'pass');
  expect(reply.status).toBe(200);
  return reply.data.revision;
}

describe('field joint', () => {
  it('claimStep > one of the two pieces has not passed > STEP_NOT_READY names it, the step stays', async () => {
    await passes(left);
    const reply = await asks(wren, joint.stepIds[0], 'claim');
    expect(reply.error).toMatchObject({
      code: 'STEP_NOT_READY',
      details: { waitsForPieces: ['V-02'] },
    });
    expect(reply.error?.message).toContain('V-02');
    expect((await state(joint.stepIds[0])).state).toBe('waiting');
  });

  it('passStep > the second of the two pieces passes > the joint is ready in the same revision, on every board', async () => {
    const board = await Board.open(wren, installationId);
    await passes(left);
    const revision = await passes(right);
    expect(await state(joint.stepIds[0])).toEqual({ state: 'ready', revision });
    await board.until(() => board.step(joint.stepIds[0] ?? '')?.state === 'ready');
    board.drop();
    expect((await asks(wren, joint.stepIds[0], 'claim')).status).toBe(200);
  });

  it('stillWet > a dried piece is wet again while its joint is in hand > the joint waits, its place is given up and stays in the record', async () => {
    const paint = await seedTraveller(
      server.app,
      installationId,
      (await server.app.deps.data.writer.query<{ id: string }[]>('SELECT id FROM station LIMIT 1'))[0]?.id ??
        '',
      [
        {
          clocks: { touchDry: 60 },
          state: 'passed',
          finishedAt: server.clock.now() - 90_000,
          passedAt: server.clock.now(),
        },
      ],
      'V-03',
    );
    const other = await seedTraveller(
      server.app,
      installationId,
      (await server.app.deps.data.writer.query<{ id: string }[]>('SELECT id FROM station LIMIT 1'))[0]?.id ??
        '',
      [{ state: 'ready', name: 'Join' }],
      'J-02',
      { kind: 'field joint', needs: [paint.pieceId] },
    );
    expect((await asks(wren, other.stepIds[0], 'claim')).status).toBe(200);
    expect((await asks(checker, paint.stepIds[0], 'still-wet', { minutes: 20 })).status).toBe(200);
    expect((await state(other.stepIds[0])).state).toBe('waiting');
    const claims = await server.app.deps.data.writer.query<{ ended_by: string | null }[]>(
      'SELECT ended_by FROM claim WHERE step_id = ?',
      [other.stepIds[0]],
    );
    expect(claims).toEqual([{ ended_by: 'step.still-wet' }]);
  });

  it('passStep > a joint typed in from paper before its pieces passed > flagged, not to be passed until they have', async () => {
    const organiser = await signedInClient(
      server,
      await seedPerson(server.app, installationId, { duties: ['organiser', 'volunteer'] }),
    );
    const person = await seedPerson(server.app, installationId);
    const recorded = await asks(organiser, joint.stepIds[0], 'record', {
      crew: [person],
      minutesAgo: 1,
    });
    expect(recorded.status).toBe(200);
    expect((await asks(checker, joint.stepIds[0], 'pass')).error).toMatchObject({
      code: 'STEP_NOT_READY',
      details: { waitsForPieces: ['V-01', 'V-02'] },
    });
    await passes(left);
    await passes(right);
    expect((await asks(checker, joint.stepIds[0], 'pass')).status).toBe(200);
    expect((await state(joint.stepIds[0])).state).toBe('passed');
  });

  it('removeSubAssembly > a piece that meets others > IN_USE names the joint', async () => {
    const organiser = await signedInClient(
      server,
      await seedPerson(server.app, installationId, { duties: ['organiser', 'volunteer'] }),
    );
    const reply = await organiser.delete(`/installations/${installationId}/sub-assemblies/${left.pieceId}`);
    expect(reply.error).toMatchObject({ code: 'IN_USE', details: { joints: ['J-01'] } });
  });
});
