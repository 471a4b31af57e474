import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { TemplateView } from '../../shared/contracts/travellers';
import { defaultTemplateSteps } from '../../shared/travellers/default-template';
import { Board } from '../support/board';
import { logged, openHall, stored, type Hall } from '../support/fixtures-safety';

let hall: Hall;
let frameId: string;
let board: Board | undefined;
beforeEach(async () => {
  hall = await openHall();
  const shape = { kind: 'cube', edgeMm: 200 };
  frameId = (
    await hall.organiser.post<{ id: string }>(`${hall.base}/frames`, { kind: 'shape', name: 'Cube', shape })
  ).data.id;
});
afterEach(async () => {
  board?.socket.disconnect();
  board = undefined;
  await hall.server.close();
});

const steps = () =>
  defaultTemplateSteps([
    { id: hall.glueId, kind: 'glue' },
    { id: hall.paintId, kind: 'paint bay' },
  ]);
const saves = (body: object = {}, id?: string) => {
  const whole = { name: 'Usual', steps: steps(), ...body };
  const path = `${hall.base}/templates`;
  return id ? hall.organiser.put<Saved>(`${path}/${id}`, whole) : hall.organiser.post<Saved>(path, whole);
};
interface Saved {
  id: string;
  revision: number;
  travellers: number;
  note: string;
}
interface Made {
  ids: string[];
  codes: string[];
}
const make = (templateId: string, quantity: number, letter = 'V') =>
  hall.organiser.post<Made>(`${hall.base}/sub-assemblies`, {
    frameId,
    templateId,
    letter,
    name: 'Cube',
    quantity,
  });
interface StepNow {
  name: string;
  hazards: string;
  tool_kinds: string;
  clocks: string | null;
  planned_seconds: number;
}
const stepsOf = (pieceId: string) =>
  stored<StepNow>(
    hall,
    `SELECT name, hazards, tool_kinds, clocks, planned_seconds FROM step
     WHERE installation_id = ? AND sub_assembly_id = ? ORDER BY position`,
    pieceId,
  );

describe('defaultTemplateSteps', () => {
  it('defaultTemplateSteps > a hall with every kind of station > the usual order, each at its place; the brushed coat dries and has no solvent', () => {
    const kinds = ['saw', 'bench', 'glue', 'paint bay', 'hanging zone'];
    const usual = defaultTemplateSteps(kinds.map((kind) => ({ id: kind, kind })));
    expect(usual.map(({ operation, stationId }) => `${operation} at ${stationId}`)).toEqual([
      'cut at saw',
      'lay out at bench',
      'tack at glue',
      'raise at glue',
      'glue out at glue',
      'clean at bench',
      'coat at paint bay',
      'hang at hanging zone',
    ]);
    const hot = usual.filter(({ hazards }) => hazards.includes('hot-glue')).map(({ operation }) => operation);
    expect(hot).toEqual(['tack', 'raise', 'glue out']);
    expect(usual.flatMap(({ hazards }) => hazards)).not.toContain('solvent-spray');
    expect(usual.filter(({ clocks }) => clocks !== null).map(({ operation }) => operation)).toEqual(['coat']);
  });
});

describe('saveTemplate', () => {
  it('saveTemplate > changed after two pieces were made from it > says that two keep their steps, and they do; new ones have the new', async () => {
    const { data: template } = await saves();
    expect(template).toMatchObject({ travellers: 0 });
    const [old] = (await make(template.id, 2)).data.ids;
    const before = await stepsOf(old!);
    const shorter = steps().filter(({ operation }) => operation !== 'hang');
    const reply = await saves({ steps: shorter, revision: template.revision }, template.id);
    expect(reply).toMatchObject({ status: 200, data: { travellers: 2 } });
    expect(reply.data.note).toContain('2 travellers');
    expect(await stepsOf(old!)).toEqual(before);
    const [fresh] = (await make(template.id, 1)).data.ids;
    expect((await stepsOf(fresh!)).map(({ name }) => name)).toEqual(shorter.map(({ name }) => name));
    expect((await logged(hall, 'template.edited')).map(({ subject }) => subject)).toEqual([
      { templateId: template.id },
    ]);
  });

  it('removeTemplate > with a traveller made from it > gone from the list, the traveller stays; making more is told at the field', async () => {
    const { data: template } = await saves();
    const [id] = (await make(template.id, 1)).data.ids;
    expect(await hall.organiser.delete(`${hall.base}/templates/${template.id}`)).toMatchObject({
      status: 200,
    });
    expect((await hall.organiser.get<TemplateView[]>(`${hall.base}/templates`)).data).toEqual([]);
    expect(await stepsOf(id!)).toHaveLength(8);
    expect(await make(template.id, 1)).toMatchObject({
      status: 400,
      error: { fields: [{ path: 'templateId' }] },
    });
  });

  it('saveTemplate > by a volunteer > refused, nothing is written', async () => {
    expect(await hall.ines.post(`${hall.base}/templates`, { name: 'Mine', steps: steps() })).toMatchObject({
      status: 403,
      error: { code: 'NOT_ALLOWED' },
    });
    expect(await stored(hall, 'SELECT id FROM traveller_template WHERE installation_id = ?')).toEqual([]);
  });
});

describe('createSubAssemblies', () => {
  it('createSubAssemblies > one cube > steps as in the template with hazards, tools, clocks; planned by hand from 12 cuts and 8 joints', async () => {
    const { data: template } = await saves();
    const [id] = (await make(template.id, 1)).data.ids;
    const rows = await stepsOf(id!);
    const usual = steps();
    expect(rows.map((row) => JSON.parse(row.hazards) as unknown)).toEqual(
      usual.map(({ hazards }) => hazards),
    );
    expect(rows.map((row) => JSON.parse(row.tool_kinds) as unknown)).toEqual(
      usual.map((step) => step.toolKinds),
    );
    expect(rows.map((row) => JSON.parse(row.clocks ?? 'null') as unknown)).toEqual(
      usual.map(({ clocks }) => clocks),
    );
    // cut 4 + 12 x 0.6; lay out 4 + 12 x 0.2 + 8 x 0.3; tack 3 + 8 x 0.7; raise 5 + 8 x 0.8; glue out 3 + 8;
    // clean 3 + 8 x 0.5; coat 4 + 12 x 0.4; hang 10; all in minutes.
    const minutes = [11.2, 8.8, 8.6, 11.4, 11, 7, 8.8, 10];
    expect(rows.map((row) => row.planned_seconds)).toEqual(minutes.map((one) => Math.round(one * 60)));
  });

  it('createSubAssemblies > 99 and then 2 more > 808 steps, two figures and then three, one log entry for each request; a board sees all', async () => {
    const { data: template } = await saves();
    board = await Board.open(hall.ines, hall.installationId);
    const first = await make(template.id, 99);
    expect(first.status).toBe(201);
    expect([first.data.codes[0], first.data.codes[98]]).toEqual(['V-01', 'V-99']);
    expect((await make(template.id, 2)).data.codes).toEqual(['V-100', 'V-101']);
    const entries = await logged(hall, 'sub-assembly.added');
    expect(entries.map(({ subject }) => (subject.ids as string[]).length)).toEqual([99, 2]);
    await board.until(
      ({ state }) => state?.records.subAssemblies.size === 101 && state.records.steps.size === 808,
    );
    const ready = [...board.state!.records.steps.values()].filter(({ state }) => state === 'ready');
    expect(ready.map(({ position }) => position)).toEqual(Array.from({ length: 101 }, () => 1));
  });

  it('createSubAssemblies > two organisers at the same moment > no code twice', async () => {
    const { data: template } = await saves();
    const replies = await Promise.all([make(template.id, 3), make(template.id, 3)]);
    const codes = replies.flatMap(({ data }) => data.codes);
    expect(codes.sort()).toEqual(['V-01', 'V-02', 'V-03', 'V-04', 'V-05', 'V-06']);
  });

  it('createSubAssemblies > the same request twice under one key > made once, the first answer again', async () => {
    const { data: template } = await saves();
    const body = { frameId, templateId: template.id, letter: 'V', name: 'Cube', quantity: 2 };
    const send = () => hall.organiser.post<Made>(`${hall.base}/sub-assemblies`, body, 'one-and-the-same-key');
    const [first, again] = [await send(), await send()];
    expect(again.data).toEqual(first.data);
    expect(await stored(hall, 'SELECT id FROM sub_assembly WHERE installation_id = ?')).toHaveLength(2);
  });

  it('createSubAssemblies > a letter whose pieces were taken out, and a letter of two > printed codes are not used again, V and VA count apart', async () => {
    const { data: template } = await saves();
    const [, last] = (await make(template.id, 2)).data.ids;
    await hall.organiser.delete(`${hall.base}/sub-assemblies/${last}`);
    expect((await make(template.id, 1, 'VA')).data.codes).toEqual(['VA-01']);
    expect((await make(template.id, 1)).data.codes).toEqual(['V-03']);
  });

  it('createSubAssemblies > past number 999 of a letter > told how many are left, nothing is made', async () => {
    const { data: template } = await saves();
    const [id] = (await make(template.id, 1)).data.ids;
    await hall.server.app.deps.data.writer.query(`UPDATE sub_assembly SET code = 'V-997' WHERE id = ?`, [id]);
    const refused = await make(template.id, 3);
    expect(refused).toMatchObject({
      status: 400,
      error: { fields: [{ path: 'quantity', code: 'no-codes' }] },
    });
    expect(refused.error?.fields?.[0]?.message).toContain('2 left');
    expect((await make(template.id, 2)).data.codes).toEqual(['V-998', 'V-999']);
  });

  it('createSubAssemblies > a station of the template was removed meanwhile > told at the step, nothing is made', async () => {
    const { data: template } = await saves();
    await hall.server.app.deps.data.writer.query('UPDATE station SET removed_at = 1 WHERE id = ?', [
      hall.paintId,
    ]);
    expect(await make(template.id, 1)).toMatchObject({ status: 400, error: { code: 'VALIDATION' } });
    expect(await stored(hall, 'SELECT id FROM sub_assembly WHERE installation_id = ?')).toEqual([]);
  });
});

describe('renameSubAssembly', () => {
  it('renameSubAssembly > another name > code stays, stored and on the board; of another hall nothing at this address', async () => {
    const { data: template } = await saves();
    const [id] = (await make(template.id, 1)).data.ids;
    board = await Board.open(hall.ines, hall.installationId);
    const path = `${hall.base}/sub-assemblies/${id}`;
    expect(await hall.organiser.patch(path, { name: 'Corner cube' })).toMatchObject({ status: 200 });
    await board.until(({ state }) => state?.records.subAssemblies.get(id!)?.name === 'Corner cube');
    expect(board.state?.records.subAssemblies.get(id!)?.code).toBe('V-01');
    expect(await logged(hall, 'sub-assembly.renamed')).toMatchObject([{ subject: { subAssemblyId: id } }]);
    expect(await hall.organiser.patch(`${hall.base}/sub-assemblies/none`, { name: 'X' })).toMatchObject({
      status: 404,
    });
  });
});

describe('subAssemblies live', () => {
  it('subAssemblies live > somebody the desk has not confirmed > sees no piece and no step', async () => {
    const { data: template } = await saves();
    await make(template.id, 1);
    await hall.server.app.deps.data.writer.query('UPDATE person SET confirmed_at = NULL WHERE id = ?', [
      hall.inesId,
    ]);
    board = await Board.open(hall.ines, hall.installationId);
    expect([board.state?.records.subAssemblies.size, board.state?.records.steps.size]).toEqual([0, 0]);
  });
});
