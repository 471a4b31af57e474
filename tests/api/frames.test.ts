import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { FrameView } from '../../shared/contracts/frames';
import type { Snapshot } from '../../shared/contracts/live';
import { defaultTemplateSteps } from '../../shared/travellers/default-template';
import { openHall, logged, stored, type Hall } from '../support/fixtures-safety';

let hall: Hall;
beforeEach(async () => {
  hall = await openHall();
});
afterEach(() => hall.server.close());

const shape = (sides: number, name = 'Lantern') => ({
  kind: 'shape',
  name,
  shape: { kind: 'prism', sides, baseBy: 'radius', baseMm: 150, heightMm: 300 },
});
const obj = (text: string) => ({ kind: 'obj', name: 'Bay', fileName: 'bay.obj', text });
const SQUARE = 'v 0 0 0\nv 100 0 0\nv 100 100 0\nv 0 100 0\nl 1 2 3 4 1\n';
const path = () => `${hall.base}/frames`;
const add = async (body: object) => (await hall.organiser.post<{ id: string }>(path(), body)).data.id;
const list = async () => (await hall.organiser.get<FrameView[]>(path())).data;

async function pieces(frameId: string, quantity: number): Promise<string[]> {
  const steps = defaultTemplateSteps([{ id: hall.glueId, kind: 'glue' }]);
  const template = await hall.organiser.post<{ id: string }>(`${hall.base}/templates`, {
    name: 'Usual',
    steps,
  });
  const body = { frameId, templateId: template.data.id, letter: 'L', name: 'Lantern', quantity };
  return (await hall.organiser.post<{ ids: string[] }>(`${hall.base}/sub-assemblies`, body)).data.ids;
}
const piece = async (id: string) =>
  (await hall.organiser.get<Snapshot>(`${hall.base}/live`)).data.records.subAssemblies.find(
    (record) => record.id === id,
  );

describe('createFrame', () => {
  it('createFrame > a square from a file > 4 joints, 4 struts, its name kept; one entry of ids in the day log', async () => {
    const reply = await hall.organiser.post<{ id: string }>(path(), obj(SQUARE));
    expect(reply.status).toBe(201);
    const rows = await stored<{ name: string; source: string }>(
      hall,
      'SELECT name, source FROM frame WHERE installation_id = ?',
    );
    expect(rows.map(({ name, source }) => [name, JSON.parse(source) as unknown])).toEqual([
      ['Bay', { kind: 'obj', fileName: 'bay.obj' }],
    ]);
    const [frame] = await list();
    expect([frame?.geometry.joints.length, frame?.geometry.struts.length]).toEqual([4, 4]);
    expect(await logged(hall, 'frame.added')).toMatchObject([
      { actor: `person:${hall.organiserId}`, subject: { frameId: reply.data.id, kind: 'obj' } },
    ]);
  });

  it('createFrame > a file of 1.9 MB > passes the limit of the body; its comments are not kept', async () => {
    const reply = await hall.organiser.post(
      path(),
      obj(`${SQUARE}${'# padding padding padding\n'.repeat(73_000)}`),
    );
    expect(reply.status).toBe(201);
  });

  it('createFrame > a file over 2 MB, and one over the limit of the body > told that it is too large, nothing is written', async () => {
    const large = await hall.organiser.post(
      path(),
      obj(`${SQUARE}${'# padding padding padding\n'.repeat(78_000)}`),
    );
    expect(large).toMatchObject({
      status: 422,
      error: { code: 'OBJ_INVALID', fields: [{ path: 'text', code: 'OBJ_TOO_LARGE' }] },
    });
    expect(large.error?.fields?.[0]?.message).toMatch(/line \d+/);
    const huge = await hall.organiser.post(path(), obj('#'.repeat(3_000_000)));
    expect(huge).toMatchObject({ status: 413, error: { code: 'BODY_TOO_LARGE' } });
    expect(await list()).toEqual([]);
  });

  it('createFrame > by a volunteer, and in a closed installation > refused, nothing is written', async () => {
    expect(await hall.ines.post(path(), shape(4))).toMatchObject({ status: 403 });
    await hall.server.app.deps.data.writer.query(`UPDATE installation SET status = 'closed' WHERE id = ?`, [
      hall.installationId,
    ]);
    expect(await hall.organiser.post(path(), shape(4))).toMatchObject({
      status: 409,
      error: { code: 'INSTALLATION_CLOSED' },
    });
    expect(await list()).toEqual([]);
  });
});

describe('editFrame', () => {
  it('editFrame > from four sides to five, nobody at work > same id, the travellers go to revision 2, and their old minutes are named', async () => {
    const id = await add(shape(4));
    const [pieceId] = await pieces(id, 2);
    const before = await piece(pieceId!);
    const reply = await hall.organiser.put<object>(`${path()}/${id}`, shape(5));
    expect(reply).toMatchObject({ status: 200, data: { id, pieces: 2, minutesStay: true } });
    const [frame] = await list();
    expect([frame?.id, frame?.geometry.struts.length, frame?.subAssemblies]).toEqual([id, 15, 2]);
    const after = await piece(pieceId!);
    expect([before?.travellerRevision, after?.travellerRevision]).toEqual([1, 2]);
    expect(after!.revision).toBeGreaterThan(before!.revision);
    expect(await logged(hall, 'frame.edited')).toMatchObject([{ subject: { frameId: id, geometry: true } }]);
  });

  it('editFrame > only its name > the travellers keep their revision, screens draw again', async () => {
    const id = await add(shape(4));
    const [pieceId] = await pieces(id, 1);
    const before = await piece(pieceId!);
    const reply = await hall.organiser.put(`${path()}/${id}`, shape(4, 'Big lantern'));
    expect(reply).toMatchObject({ data: { pieces: 0, minutesStay: false } });
    const after = await piece(pieceId!);
    expect(after?.travellerRevision).toBe(1);
    expect(after!.revision).toBeGreaterThan(before!.revision);
  });

  it('editFrame > a piece that was taken out > its record does not change any more', async () => {
    const id = await add(shape(4));
    const [gone, stays] = await pieces(id, 2);
    await hall.organiser.delete(`${hall.base}/sub-assemblies/${gone}`);
    const before = await piece(gone!);
    await hall.organiser.put(`${path()}/${id}`, shape(6));
    expect(await piece(gone!)).toEqual(before);
    expect((await piece(stays!))?.travellerRevision).toBe(2);
  });

  it('editFrame > a file that is broken > every line that is wrong, the frame stays as it was', async () => {
    const id = await add(obj(SQUARE));
    const reply = await hall.organiser.put(`${path()}/${id}`, obj('v 0 0 0\nv 1 nan 0\nl 1 1\n'));
    expect(reply).toMatchObject({ status: 422, error: { code: 'OBJ_INVALID' } });
    const words = (reply.error?.fields ?? []).map(({ message }) => message);
    expect(words.some((one) => /ine 2\b/.test(one))).toBe(true);
    expect(words.some((one) => /ine 3\b/.test(one))).toBe(true);
    expect((await list())[0]?.geometry.joints).toHaveLength(4);
  });

  it('editFrame > of another installation > nothing at this address', async () => {
    const id = await add(shape(4));
    const other = await openHall();
    try {
      expect(await other.organiser.put(`${other.base}/frames/${id}`, shape(5))).toMatchObject({
        status: 404,
      });
    } finally {
      await other.server.close();
    }
  });
});

describe('removeFrame', () => {
  it('removeFrame > with one piece, then without > refused with the number, then gone from the list but kept as a row', async () => {
    const id = await add(shape(4));
    const [pieceId] = await pieces(id, 1);
    const refused = await hall.organiser.delete(`${path()}/${id}`);
    expect(refused).toMatchObject({ status: 409, error: { code: 'IN_USE', details: { pieces: 1 } } });
    expect(refused.error?.message).toContain('1 piece is made');
    await hall.organiser.delete(`${hall.base}/sub-assemblies/${pieceId}`);
    expect(await hall.organiser.delete(`${path()}/${id}`)).toMatchObject({ status: 200 });
    expect(await list()).toEqual([]);
    expect(await stored(hall, 'SELECT id FROM frame WHERE installation_id = ?')).toEqual([{ id }]);
    expect(await logged(hall, 'frame.removed')).toMatchObject([{ subject: { frameId: id } }]);
    expect(await hall.organiser.delete(`${path()}/${id}`)).toMatchObject({ status: 404 });
  });
});
