import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { Snapshot } from '../../shared/contracts/live';
import { newId } from '../../shared/kernel/ids';
import { seededRandom } from '../../shared/kernel/random';
import { fromSnapshot } from '../../src/lib/live-state';
import { Board } from '../support/board';
import { inScope, seedInstallation, seedPerson, signedInClient } from '../support/fixtures';
import { seedTraveller } from '../support/fixtures-steps';
import { startTestServer, type TestClient, type TestServer } from '../support/test-server';

let server: TestServer;
let installationId: string;
let glueId: string;
let steps: string[];
const boards: Board[] = [];

beforeEach(async () => {
  server = await startTestServer();
  ({ installationId, glueId } = await seedInstallation(server.app));
  ({ stepIds: steps } = await seedTraveller(server.app, installationId, glueId, [{}, {}, {}], 'V-01'));
});
afterEach(async () => {
  for (const board of boards.splice(0)) board.drop();
  await server.close();
});

const claimPath = (stepId: string) => `/installations/${installationId}/steps/${stepId}/claim`;

async function person(
  wish: Parameters<typeof seedPerson>[2] = {},
): Promise<{ id: string; client: TestClient }> {
  const id = await seedPerson(server.app, installationId, wish);
  return { id, client: await signedInClient(server, id) };
}
async function open(client: TestClient): Promise<Board> {
  const board = await Board.open(client, installationId);
  boards.push(board);
  return board;
}
const stepId = (index: number) => steps[index] as string;

describe('signing out', () => {
  it('signOut > a person with the board open on two phones > the page of the one that signed out is cut off, the other goes on', async () => {
    const { id, client } = await person();
    const [left, stays] = [await open(client), await open(await signedInClient(server, id))];
    expect((await client.delete('/session')).status).toBe(200);
    await left.until((board) => board.ended && board.socket.disconnected);
    const reply = await (await person()).client.post(claimPath(stepId(0)));
    const { revision } = reply.data as { revision: number };
    await stays.until((board) => (board.state?.cursor ?? 0) >= revision);
    expect(left.state?.cursor ?? 0).toBeLessThan(revision);
  });
});

describe('live path', () => {
  it('claim > watched by a lead, a volunteer and somebody at the door > each gets the range, whoever waits at the door sees no step and no name', async () => {
    const lead = await person({ duties: ['safety lead', 'volunteer'] });
    const wren = await person({ firstName: 'Wren', initial: 'S' });
    const waiting = await person({ confirmed: false });
    const [leadBoard, wrenBoard, doorBoard] = [
      await open(lead.client),
      await open(wren.client),
      await open(waiting.client),
    ];
    const reply = await wren.client.post(claimPath(stepId(0)));
    expect(reply.status).toBe(200);
    const { revision } = reply.data as { revision: number };
    const reached = (board: Board) => (board.state?.cursor ?? 0) >= revision;
    await Promise.all([leadBoard, wrenBoard, doorBoard].map((board) => board.until(reached)));
    expect(leadBoard.step(stepId(0))).toMatchObject({
      state: 'in hand',
      crew: [{ personId: wren.id }],
      revision,
    });
    expect(wrenBoard.step(stepId(0))).toMatchObject({ state: 'in hand', revision });
    expect(doorBoard.state?.records.steps.size).toBe(0);
    expect([...(doorBoard.state?.records.people.values() ?? [])].map(({ id }) => id)).toEqual([waiting.id]);
    expect(wrenBoard.state?.records.people.get(lead.id)).toMatchObject({ name: 'Ines K', details: null });
    expect(doorBoard.gaps).toBe(0);
  });

  it('claims > twenty at once > boards get fewer messages than there were claims, and every board agrees with a fresh snapshot', async () => {
    const { stepIds } = await seedTraveller(
      server.app,
      installationId,
      glueId,
      Array.from({ length: 20 }, () => ({ state: 'ready' as const })),
      'V-02',
    );
    const people = await Promise.all(Array.from({ length: 20 }, () => person()));
    const board = await open((people[0] as { client: TestClient }).client);
    const replies = await Promise.all(
      people.map(({ client }, index) => client.post(claimPath(stepIds[index] as string))),
    );
    expect(replies.map(({ status }) => status)).toEqual(Array.from({ length: 20 }, () => 200));
    await board.until(({ state }) =>
      stepIds.every((id) => state?.records.steps.get(id)?.state === 'in hand'),
    );
    expect(board.ranges.length).toBeLessThan(20);
    const snapshot = (
      await (people[0] as { client: TestClient }).client.get<Snapshot>(
        `/installations/${installationId}/live`,
      )
    ).data;
    expect(board.state).toEqual(fromSnapshot(snapshot));
  });

  it('reconnect > changes were made meanwhile > one catch-up brings exactly what a fresh snapshot says', async () => {
    const wren = await person();
    const kofi = await person();
    const board = await open(wren.client);
    board.drop();
    await kofi.client.post(claimPath(stepId(0)));
    await kofi.client.post(`/installations/${installationId}/steps/${stepId(0)}/start`);
    const catchUp = await board.reconnect();
    expect(catchUp).toMatchObject({
      reset: false,
      changed: { steps: [{ id: stepId(0), state: 'in hand' }] },
    });
    const snapshot = (await wren.client.get<Snapshot>(`/installations/${installationId}/live`)).data;
    expect(board.state).toEqual(fromSnapshot(snapshot));
  });

  it('changes > since a revision that this database never had > a reset with the whole state', async () => {
    const wren = await person();
    const reply = await wren.client.get(`/installations/${installationId}/changes?since=99999`);
    expect(reply.data).toMatchObject({ reset: true, snapshot: { audience: 'people' } });
  });

  it('confirmation > given at the desk > the phone is moved to the people, with a reset that shows the board', async () => {
    const waiting = await person({ confirmed: false });
    const board = await open(waiting.client);
    expect(board.state?.audience).toBe('door');
    await inScope(server.app, installationId, async (scope) => {
      const revision = await scope.revision();
      await scope.manager.query('UPDATE person SET confirmed_at = ?, revision = ? WHERE id = ?', [
        scope.now,
        revision,
        waiting.id,
      ]);
      scope.changed('people', waiting.id);
    });
    await board.until(({ state }) => state?.audience === 'people');
    expect(board.resets).toBe(1);
    expect(board.state?.records.steps.size).toBe(3);
  });

  it('removal > a person is taken out > the socket is told that it ended, and may not watch again', async () => {
    const gone = await person();
    const board = await open(gone.client);
    await inScope(server.app, installationId, async (scope) => {
      const revision = await scope.revision();
      await scope.manager.query('UPDATE person SET removed_at = ?, revision = ? WHERE id = ?', [
        scope.now,
        revision,
        gone.id,
      ]);
      scope.changed('people', gone.id);
    });
    await board.until(({ ended, socket }) => ended && !socket.connected);
    await expect(Board.open(gone.client, installationId)).rejects.toThrow('SIGN_IN_NEEDED');
  });

  it('watch > by somebody of another installation > answered as if there were none', async () => {
    const other = await seedInstallation(server.app);
    const id = await seedPerson(server.app, other.installationId);
    const client = await signedInClient(server, id);
    await expect(Board.open(client, installationId)).rejects.toThrow('NOT_FOUND');
    await expect(Board.open(client, newId())).rejects.toThrow('NOT_FOUND');
  });

  it('display > watches with its token > sees steps, names and counts, no ages, no sign-offs', async () => {
    const tokenId = newId();
    await server.app.deps.unitOfWork.run((manager) =>
      manager.query(
        'INSERT INTO display_token (id, installation_id, label, token_hash, created_at) VALUES (?, ?, ?, ?, 0)',
        [tokenId, installationId, 'wall', newId()],
      ),
    );
    await person({ ageBand: '13-15' });
    const client = await signedInClient(server, `display:${tokenId}`);
    const board = await open(client);
    expect(board.state?.audience).toBe('projector');
    expect(board.state?.records.steps.size).toBe(3);
    expect([...(board.state?.records.people.values() ?? [])].every(({ details }) => details === null)).toBe(
      true,
    );
    expect(board.state?.records.signOffs.size).toBe(0);
    const refused = await client.post(claimPath(stepId(0)));
    expect(refused.error?.code).toBe('NOT_ALLOWED');
  });

  it('a network that drops at random > 60 changes, five boards, one seed > every board ends with the same state as a snapshot', async () => {
    const random = seededRandom(7);
    const people = await Promise.all(Array.from({ length: 5 }, () => person()));
    const all = await Promise.all(people.map(({ client }) => open(client)));
    const { stepIds } = await seedTraveller(
      server.app,
      installationId,
      glueId,
      Array.from({ length: 12 }, () => ({ state: 'ready' as const, crewMax: 5 })),
      'V-03',
    );
    for (let round = 0; round < 60; round += 1) {
      const index = Math.floor(random() * 5);
      const board = all[index] as Board;
      if (random() < 0.3) {
        if (board.socket.connected) board.drop();
        else await board.reconnect();
      }
      const { client } = people[index] as { client: TestClient };
      const step = stepIds[Math.floor(random() * 12)] as string;
      await client.post(
        random() < 0.6 ? claimPath(step) : `/installations/${installationId}/steps/${step}/give-back`,
      );
    }
    const [first] = people;
    const snapshot = fromSnapshot(
      (await (first as { client: TestClient }).client.get<Snapshot>(`/installations/${installationId}/live`))
        .data,
    );
    for (const board of all) {
      if (!board.socket.connected) await board.reconnect();
      await board.until(({ state }) => state?.cursor === snapshot.cursor);
      expect(board.state?.records.steps).toEqual(snapshot.records.steps);
      expect(board.gaps).toBe(0);
    }
  });
});
