import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { Board } from '../support/board';
import { logged, openHall, signsOff, stored, type Hall } from '../support/fixtures-safety';
import { seedPerson, signedInClient } from '../support/fixtures';
import type { TestClient } from '../support/test-server';

let hall: Hall;
let keeper: TestClient;
let keeperId: string;
let boards: Board[];

beforeEach(async () => {
  hall = await openHall();
  boards = [];
  keeperId = await seedPerson(hall.server.app, hall.installationId, {
    firstName: 'Cleo',
    initial: 'F',
    duties: ['crib keeper'],
  });
  keeper = await signedInClient(hall.server, keeperId);
});
afterEach(async () => {
  for (const board of boards) board.socket.disconnect();
  await hall.server.close();
});

const MINUTE = 60_000;
const NIPPERS = {
  number: 'N-01',
  name: 'nippers',
  kind: 'nippers',
  hazard: null,
  traits: {},
  condition: 'good',
};
const GUN = {
  ...NIPPERS,
  number: 'G-01',
  name: 'hot-glue gun',
  kind: 'hot-glue gun',
  hazard: 'hot-glue',
  traits: { temperature: 'high', watts: 100, hot: true },
};
const add = async (tool: object = NIPPERS) =>
  (await keeper.post<{ id: string }>(`${hall.base}/tools`, tool)).data.id;
const does = (toolId: string, what: string, body: object = {}, who = keeper) =>
  who.post(`${hall.base}/tools/${toolId}/${what}`, body);
const lend = (toolId: string, personId: string, more: object = {}) =>
  does(toolId, 'lend', { personId, stationId: null, minutes: 60, ...more });
const back = (toolId: string, more: object = {}, who = keeper) =>
  does(toolId, 'take-back', { condition: '', tagReason: null, ...more }, who);
const open = async (who: TestClient | string): Promise<Board> => {
  const client = typeof who === 'string' ? await signedInClient(hall.server, who) : who;
  const board = await Board.open(client, hall.installationId);
  boards.push(board);
  return board;
};
interface Row {
  tool_id: string;
  person_id: string;
  station_id: string | null;
  out_by: string;
  back_at: number | null;
  taken_back_by: string | null;
  condition_back: string | null;
}
const checkouts = () =>
  stored<Row>(hall, 'SELECT * FROM checkout WHERE installation_id = ? ORDER BY out_at, id');
const tagOf = async (toolId: string) => {
  const [row] = await stored<{ tag: string | null; condition: string }>(
    hall,
    'SELECT tag, condition FROM tool WHERE installation_id = ? AND id = ?',
    toolId,
  );
  return { tag: JSON.parse(row?.tag ?? 'null') as { by: string; reason: string } | null, is: row?.condition };
};

describe('lendTool', () => {
  it('lendTool > to the glue bench in a named charge > row, board of everybody in the hall and day log say who, where and for how long', async () => {
    const tool = await add();
    const board = await open(hall.ines);
    const reply = await lend(tool, hall.inesId, { stationId: hall.glueId, minutes: 30 });
    const backBy = hall.server.clock.now() + 30 * MINUTE;
    expect(reply).toMatchObject({ status: 200, data: { backBy, limits: [] } });
    expect(await checkouts()).toMatchObject([
      { tool_id: tool, person_id: hall.inesId, station_id: hall.glueId, out_by: keeperId, back_at: null },
    ]);
    await board.until(({ state }) => state?.records.checkouts.size === 1);
    expect([...board.state!.records.checkouts.values()]).toMatchObject([
      { toolId: tool, personId: hall.inesId, stationId: hall.glueId, backBy, backAt: null },
    ]);
    expect(await logged(hall, 'tool.lent')).toMatchObject([
      {
        actor: `person:${keeperId}`,
        forPersonId: hall.inesId,
        subject: { toolId: tool, personId: hall.inesId },
      },
    ]);
  });

  it('lendTool > out for 12 minutes, then overdue > the next one is told who has it, since when, back by', async () => {
    const tool = await add();
    await lend(tool, hall.inesId, { minutes: 30 });
    hall.server.clock.advance(12 * MINUTE);
    const early = await lend(tool, hall.leadId);
    expect(early.error?.message).toContain('Ines K has had it for 12 min, and it is due back in 18 min');
    hall.server.clock.advance(88 * MINUTE);
    const late = await lend(tool, hall.leadId);
    expect(late).toMatchObject({
      status: 409,
      error: { code: 'TOOL_OUT', details: { personId: hall.inesId } },
    });
    expect(late.error?.message).toContain('for 1 h 40 min, and it was due back 1 h 10 min ago');
    expect(await checkouts()).toHaveLength(1);
  });

  it('lendTool > two keepers and two boards at once, ten times > one winner each, the boards agree on who', async () => {
    const second = await signedInClient(
      hall.server,
      await seedPerson(hall.server.app, hall.installationId, { duties: ['crib keeper'] }),
    );
    const board = await open(hall.ines);
    for (let round = 1; round <= 10; round += 1) {
      const tool = await add({ ...NIPPERS, number: `N-${String(round).padStart(2, '0')}` });
      const body = (personId: string) => ({ personId, stationId: null, minutes: 60 });
      const replies = await Promise.all([
        does(tool, 'lend', body(hall.inesId)),
        does(tool, 'lend', body(hall.leadId), second),
      ]);
      expect(replies.map(({ status }) => status).sort()).toEqual([200, 409]);
      const winner = replies[0].status === 200 ? hall.inesId : hall.leadId;
      await board.until(({ state }) =>
        [...(state?.records.checkouts.values() ?? [])].some(
          (one) => one.toolId === tool && one.personId === winner,
        ),
      );
    }
    expect(await checkouts()).toHaveLength(10);
  });

  it('lendTool > not confirmed, signed out, unknown, a station that is gone > each refused with its own reason, nothing goes out', async () => {
    const tool = await add();
    const door = await seedPerson(hall.server.app, hall.installationId, { confirmed: false });
    const gone = await seedPerson(hall.server.app, hall.installationId, { leftAt: 1 });
    expect(await lend(tool, door)).toMatchObject({ status: 409, error: { code: 'PERSON_NOT_CONFIRMED' } });
    expect(await lend(tool, gone)).toMatchObject({ status: 409, error: { code: 'PERSON_NOT_ON_SITE' } });
    expect(await lend(tool, 'nobody')).toMatchObject({
      status: 400,
      error: { fields: [{ path: 'personId' }] },
    });
    expect(await lend(tool, hall.inesId, { stationId: 'gone' })).toMatchObject({
      status: 400,
      error: { fields: [{ path: 'stationId' }] },
    });
    expect(await lend('none', hall.inesId)).toMatchObject({ status: 404 });
    expect(await checkouts()).toEqual([]);
  });

  it('lendTool > by a volunteer, and in a closed installation > refused, nothing goes out', async () => {
    const tool = await add();
    const body = { personId: hall.inesId, stationId: null, minutes: 60 };
    expect(await does(tool, 'lend', body, hall.ines)).toMatchObject({ status: 403 });
    await hall.server.app.deps.data.writer.query(`UPDATE installation SET status = 'closed' WHERE id = ?`, [
      hall.installationId,
    ]);
    expect(await lend(tool, hall.inesId)).toMatchObject({ error: { code: 'INSTALLATION_CLOSED' } });
    expect(await checkouts()).toEqual([]);
  });

  it('lendTool > the low-temperature gun to a signed-off fifteen-year-old > out, and the keeper is told what to say', async () => {
    const low = {
      ...GUN,
      number: 'W-01',
      kind: 'low-temp glue gun',
      traits: { temperature: 'low', hot: true },
    };
    const tool = await add(low);
    const wish = { firstName: 'Yuki', ageBand: '13-15' as const, adultName: 'Ines K' };
    const yuki = await seedPerson(hall.server.app, hall.installationId, wish);
    await signsOff(hall, await signedInClient(hall.server, yuki), hall.lead);
    const reply = await lend(tool, yuki);
    const { limits } = reply.data as { limits: { key: string }[] };
    expect(limits.map(({ key }) => key)).toEqual([
      'low-temperature-gun-only',
      'still-burns',
      'adult-at-bench',
    ]);
    const refused = await lend(await add(GUN), yuki);
    expect(refused).toMatchObject({ status: 409, error: { code: 'AGE_RULE' } });
    expect(refused.error?.message).toContain('16 and over');
    expect(refused.error?.message).toContain('a low-temperature gun');
    expect((await checkouts()).map((row) => row.tool_id)).toEqual([tool]);
  });

  it('lendTool > a stop of hot tools > the gun stays, the nippers go', async () => {
    const [gun, nippers] = [await add(GUN), await add()];
    await signsOff(hall, hall.ines, hall.lead);
    await hall.lead.post(`${hall.base}/stops`, { scope: 'hot-tools', reason: 'smoke' });
    expect(await lend(gun, hall.inesId)).toMatchObject({ status: 409, error: { code: 'STOP_ACTIVE' } });
    expect(await lend(nippers, hall.inesId)).toMatchObject({ status: 200 });
  });
});

describe('takeBackTool', () => {
  it('takeBackTool > worn and late > row, board, tool and day log say so; who took it, that it was late', async () => {
    const tool = await add();
    await lend(tool, hall.inesId, { minutes: 5 });
    const board = await open(hall.ines);
    hall.server.clock.advance(6 * MINUTE);
    expect(await back(tool, { condition: 'blunt' })).toMatchObject({ status: 200 });
    expect(await checkouts()).toMatchObject([
      { back_at: hall.server.clock.now(), taken_back_by: keeperId, condition_back: 'blunt' },
    ]);
    await board.until(({ state }) => state?.records.tools.get(tool)?.condition === 'blunt');
    expect(await logged(hall, 'tool.taken-back')).toMatchObject([
      { forPersonId: hall.inesId, subject: { toolId: tool, personId: hall.inesId, late: true } },
    ]);
    expect(await lend(tool, hall.leadId)).toMatchObject({ status: 200 });
  });

  it('takeBackTool > from somebody who was taken out of the installation > still possible', async () => {
    const tool = await add();
    await lend(tool, hall.inesId);
    expect(await hall.organiser.delete(`${hall.base}/people/${hall.inesId}`)).toMatchObject({ status: 200 });
    expect(await back(tool)).toMatchObject({ status: 200 });
  });

  it("takeBackTool > with a tag while another's tag hangs on it > that tag stays its author's, what is found now is kept as condition", async () => {
    const tool = await add();
    await lend(tool, hall.inesId);
    await does(tool, 'tag', { reason: 'the spring is loose' }, hall.lead);
    expect(await back(tool, { condition: 'wet', tagReason: 'the grip is cracked' })).toMatchObject({
      status: 200,
    });
    expect(await tagOf(tool)).toMatchObject({
      tag: { by: hall.leadId, reason: 'the spring is loose' },
      is: 'wet; the grip is cracked',
    });
    expect((await checkouts())[0]?.condition_back).toBe('wet; the grip is cracked');
    expect(await does(tool, 'clear-tag', { inspected: true, reason: '' })).toMatchObject({
      status: 409,
      error: { code: 'TOOL_TAG_OTHER' },
    });
    expect(await logged(hall, 'tool.tagged')).toHaveLength(1);
  });

  it('takeBackTool > two keepers at once > one takes it, the other is told that it is in', async () => {
    const tool = await add();
    await lend(tool, hall.inesId);
    const replies = await Promise.all([back(tool), back(tool, {}, hall.lead)]);
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect(await logged(hall, 'tool.taken-back')).toHaveLength(1);
  });
});

describe('out-of-use tag', () => {
  it('out-of-use tag > hung and cleared by its author > refusal names who and why; a second tag does not replace it; the board follows', async () => {
    const tool = await add();
    const board = await open(hall.ines);
    expect(await does(tool, 'tag', { reason: 'the blade is loose' })).toMatchObject({ status: 200 });
    await board.until(({ state }) => state?.records.tools.get(tool)?.tag?.by === keeperId);
    const refused = await lend(tool, hall.inesId);
    expect(refused).toMatchObject({ error: { code: 'TOOL_OUT_OF_USE', details: { by: keeperId } } });
    expect(refused.error?.message).toContain('Cleo F');
    expect(await does(tool, 'tag', { reason: 'mine now' }, hall.lead)).toMatchObject({
      error: { code: 'TOOL_OUT_OF_USE' },
    });
    expect((await tagOf(tool)).tag).toMatchObject({ by: keeperId, reason: 'the blade is loose' });
    expect(await does(tool, 'clear-tag', { inspected: true, reason: '' })).toMatchObject({ status: 200 });
    await board.until(({ state }) => state?.records.tools.get(tool)?.tag === null);
    expect(await does(tool, 'clear-tag', { inspected: true, reason: '' })).toMatchObject({
      error: { code: 'STALE_PAGE' },
    });
    expect(await logged(hall, 'tool.tag-cleared')).toMatchObject([
      { subject: { toolId: tool, taggedBy: keeperId } },
    ]);
  });

  it('out-of-use tag > by a volunteer > refused; a volunteer tells the crib', async () => {
    const tool = await add();
    expect(await does(tool, 'tag', { reason: 'I like it' }, hall.ines)).toMatchObject({ status: 403 });
    expect((await tagOf(tool)).tag).toBeNull();
  });
});

describe('tools and checkouts live', () => {
  it('tools and checkouts live > door, projector, hall > nothing; the count without conditions and tools; both', async () => {
    const tool = await add();
    await lend(tool, hall.inesId);
    await back(tool, { condition: 'blunt' });
    const door = await open(await seedPerson(hall.server.app, hall.installationId, { confirmed: false }));
    expect([door.state?.records.tools.size, door.state?.records.checkouts.size]).toEqual([0, 0]);
    const display = await hall.organiser.post<{ id: string }>(`${hall.base}/displays`, { label: 'wall' });
    const projector = await open(`display:${display.data.id}`);
    expect(projector.state?.records.tools.size).toBe(0);
    const shown = [...(projector.state?.records.checkouts.values() ?? [])];
    expect(shown.map((one) => [one.toolId, one.conditionBack])).toEqual([[tool, null]]);
    const inHall = await open(hall.ines);
    expect(inHall.state?.records.tools.size).toBe(1);
    expect([...inHall.state!.records.checkouts.values()][0]?.conditionBack).toBe('blunt');
  });
});

describe('editTool', () => {
  it('editTool > another number > stored and logged; removed while out > refused with who has it; in > gone, its number is not given again', async () => {
    const tool = await add();
    const path = `${hall.base}/tools/${tool}`;
    expect(await keeper.put(path, { ...NIPPERS, number: 'N-07' })).toMatchObject({ status: 200 });
    await lend(tool, hall.inesId);
    const refused = await keeper.delete(path);
    expect(refused).toMatchObject({ status: 409, error: { code: 'IN_USE' } });
    expect(refused.error?.message).toContain('N-07 is out with Ines K');
    await back(tool);
    expect(await keeper.delete(path)).toMatchObject({ status: 200 });
    expect(await keeper.post(`${hall.base}/tools`, { ...NIPPERS, number: 'N-07' })).toMatchObject({
      status: 400,
      error: { fields: [{ path: 'number', code: 'taken' }] },
    });
    const actions = ['tool.added', 'tool.edited', 'tool.removed'];
    for (const action of actions) expect(await logged(hall, action)).toHaveLength(1);
  });
});
