import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { Snapshot } from '../../shared/contracts/live';
import { openHall, signsOff, type Hall } from '../support/fixtures-safety';
import { seedPerson, signedInClient } from '../support/fixtures';
import type { TestClient } from '../support/test-server';

let hall: Hall;
let keeper: TestClient;
let keeperId: string;

beforeEach(async () => {
  hall = await openHall();
  keeperId = await seedPerson(hall.server.app, hall.installationId, { duties: ['crib keeper'] });
  keeper = await signedInClient(hall.server, keeperId);
});
afterEach(() => hall.server.close());

const GUN = {
  number: 'G-01',
  name: 'hot-glue gun',
  kind: 'hot-glue gun',
  hazard: 'hot-glue',
  traits: { temperature: 'high', watts: 100 },
  condition: 'good',
};
const addTool = async (changes: object = {}) =>
  (await keeper.post<{ id: string }>(`${hall.base}/tools`, { ...GUN, ...changes })).data.id;
const lend = (toolId: string, personId: string, more: object = {}) =>
  keeper.post<{ checkoutId: string }>(`${hall.base}/tools/${toolId}/lend`, {
    personId,
    stationId: null,
    minutes: 60,
    ...more,
  });
const open = async () =>
  (await keeper.get<Snapshot>(`${hall.base}/live`)).data.records.checkouts.filter(
    ({ backAt }) => backAt === null,
  );
const actions = async () =>
  (
    await hall.server.app.deps.data.writer.query<{ action: string }[]>(
      `SELECT action FROM day_log WHERE action LIKE 'tool.%' ORDER BY seq`,
    )
  ).map(({ action }) => action);

describe('lendTool', () => {
  it('lendTool > a gun for somebody who was not briefed > refused with SIGN_OFF_MISSING, it stays in the crib', async () => {
    const gun = await addTool();
    expect(await lend(gun, hall.inesId)).toMatchObject({
      status: 409,
      error: { code: 'SIGN_OFF_MISSING', details: { hazard: 'hot-glue', missing: 'NOT_READ' } },
    });
    expect(await open()).toEqual([]);
    expect(await actions()).toEqual(['tool.added']);
  });

  it('lendTool > a gun for somebody signed and countersigned > out, with who and until when; the next one is told who has it', async () => {
    const gun = await addTool();
    await signsOff(hall, hall.ines, hall.lead);
    expect(await lend(gun, hall.inesId)).toMatchObject({ status: 200 });
    expect(await open()).toMatchObject([
      { toolId: gun, personId: hall.inesId, stationId: null, backBy: hall.server.clock.now() + 3_600_000 },
    ]);
    const again = await lend(gun, hall.leadId);
    expect(again).toMatchObject({
      status: 409,
      error: { code: 'TOOL_OUT', details: { personId: hall.inesId } },
    });
    expect(again.error?.message).toContain('Ines');
    expect(await actions()).toEqual(['tool.added', 'tool.lent']);
  });

  it('lendTool > two keepers lend the same tool at once > exactly one checkout', async () => {
    const saw = await addTool({
      number: 'S-01',
      name: 'mitre box and saw',
      kind: 'mitre box and saw',
      hazard: null,
      traits: {},
    });
    const replies = await Promise.all([lend(saw, hall.inesId), lend(saw, hall.leadId)]);
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect(await open()).toHaveLength(1);
  });

  it('lendTool > a high-temperature gun for a fourteen-year-old > refused with the rule, its source and what may be taken instead', async () => {
    const [hot, low] = [
      await addTool(),
      await addTool({
        number: 'W-01',
        name: 'low-temp gun',
        kind: 'low-temp glue gun',
        traits: { temperature: 'low' },
      }),
    ];
    const yuki = await seedPerson(hall.server.app, hall.installationId, {
      firstName: 'Yuki',
      ageBand: '13-15',
      adultName: 'Ines K',
    });
    await signsOff(hall, await signedInClient(hall.server, yuki), hall.lead);
    const reply = await lend(hot, yuki);
    expect(reply).toMatchObject({
      status: 409,
      error: { code: 'AGE_RULE', details: { rule: 'high-temperature-gun', from: '16-17' } },
    });
    expect((reply.error?.details?.source as { text: string }).text.length).toBeGreaterThan(10);
    expect(reply.error?.details?.alternatives).not.toEqual([]);
    expect(await lend(low, yuki)).toMatchObject({ status: 200 });
  });

  it('lendTool > tagged out of use > refused with who and why, until it is cleared after inspection by its author or by a second person with a reason', async () => {
    const saw = await addTool({ number: 'S-01', hazard: null, kind: 'hand saw', traits: {} });
    const path = `${hall.base}/tools/${saw}`;
    await hall.lead.post(`${path}/tag`, { reason: 'the blade is loose' });
    const refused = await lend(saw, hall.inesId);
    expect(refused).toMatchObject({
      status: 409,
      error: { code: 'TOOL_OUT_OF_USE', details: { reason: 'the blade is loose', by: hall.leadId } },
    });
    expect(refused.error?.message).toContain('Lena');
    expect(await keeper.post(`${path}/clear-tag`, { inspected: false, reason: '' })).toMatchObject({
      status: 400,
    });
    expect(await keeper.post(`${path}/clear-tag`, { inspected: true, reason: '' })).toMatchObject({
      status: 409,
      error: { code: 'TOOL_TAG_OTHER' },
    });
    expect(
      await keeper.post(`${path}/clear-tag`, { inspected: true, reason: 'blade tightened and tried' }),
    ).toMatchObject({ status: 200 });
    expect(await lend(saw, hall.inesId)).toMatchObject({ status: 200 });
  });

  it('takeBackTool > under a stop, from somebody who has gone, in a closed installation > always possible; with a tag when it is not safe', async () => {
    const gun = await addTool();
    await signsOff(hall, hall.ines, hall.lead);
    await lend(gun, hall.inesId);
    await hall.lead.post(`${hall.base}/stops`, { scope: 'everything', reason: 'alarm' });
    const other = await addTool({ number: 'G-02' });
    await signsOff(hall, hall.lead, hall.second);
    expect(await lend(other, hall.leadId)).toMatchObject({ error: { code: 'STOP_ACTIVE' } });
    await hall.server.app.deps.data.writer.query('UPDATE person SET left_at = 1 WHERE id = ?', [hall.inesId]);
    await hall.server.app.deps.data.writer.query(`UPDATE installation SET status = 'closed' WHERE id = ?`, [
      hall.installationId,
    ]);
    const back = await keeper.post(`${hall.base}/tools/${gun}/take-back`, {
      condition: 'drips',
      tagReason: 'drips when upright',
    });
    expect(back).toMatchObject({ status: 200 });
    expect(await open()).toEqual([]);
    const tools = (await keeper.get<Snapshot>(`${hall.base}/live`)).data.records.tools;
    expect(tools.find(({ id }) => id === gun)).toMatchObject({
      condition: 'drips',
      tag: { reason: 'drips when upright', by: keeperId },
    });
    expect(
      await keeper.post(`${hall.base}/tools/${gun}/take-back`, { condition: '', tagReason: null }),
    ).toMatchObject({ error: { code: 'TOOL_NOT_OUT' } });
  });

  it('addTool > a number that stands on another tool, letters that are misheard > told at the field', async () => {
    await addTool();
    expect(await keeper.post(`${hall.base}/tools`, GUN)).toMatchObject({
      status: 400,
      error: { fields: [{ path: 'number', code: 'taken' }] },
    });
    expect(await keeper.post(`${hall.base}/tools`, { ...GUN, number: 'B-1' })).toMatchObject({
      status: 400,
      error: { fields: [{ path: 'number' }] },
    });
  });
});
