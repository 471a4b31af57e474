import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { FrameView } from '../../shared/contracts/frames';
import { openHall, logged, stored, type Hall } from '../support/fixtures-safety';

let hall: Hall;
beforeEach(async () => {
  hall = await openHall();
});
afterEach(() => hall.server.close());

const CSV = 'joint,x,y,z\n1,0,0,0\n2,100,0,0\n3,0,100,0\nstrut,from,to\n1,1,2\n2,2,3\n3,3,1\n';
const csv = (text: string, more: object = {}) => ({
  kind: 'csv',
  name: 'Truss',
  fileName: 'truss.csv',
  text,
  ...more,
});
const geometry = {
  joints: [
    { x: 0, y: 0, z: 0 },
    { x: 100, y: 0, z: 0 },
    { x: 0, y: 100, z: 0 },
  ],
  struts: [
    [0, 1],
    [1, 2],
  ],
  faces: [],
};
const table = (part: object = {}, more: object = {}) => ({
  kind: 'table',
  name: 'By hand',
  geometry: { ...geometry, ...part },
  ...more,
});
const path = () => `${hall.base}/frames`;
const add = async (body: object) => (await hall.organiser.post<{ id: string }>(path(), body)).data.id;
const list = async () => (await hall.organiser.get<FrameView[]>(path())).data;
/** A chain of struts along x. */
const chain = (struts: number) => ({
  joints: Array.from({ length: struts + 1 }, (_, at) => ({ x: at * 10, y: 0, z: 0 })),
  struts: Array.from({ length: struts }, (_, at) => [at, at + 1]),
});

describe('createFrame', () => {
  it('createFrame > a CSV of joints and struts > 3 joints, 3 struts, the file named as its source, one entry in the day log', async () => {
    const reply = await hall.organiser.post<{ id: string }>(path(), csv(CSV));
    expect(reply.status).toBe(201);
    const [frame] = await list();
    expect(frame).toMatchObject({ source: { kind: 'csv', fileName: 'truss.csv' }, name: 'Truss' });
    expect([frame?.geometry.joints.length, frame?.geometry.struts.length]).toEqual([3, 3]);
    expect(await logged(hall, 'frame.added')).toMatchObject([
      { actor: `person:${hall.organiserId}`, subject: { frameId: reply.data.id, kind: 'csv' } },
    ]);
  });

  it('createFrame > a CSV with two wrong lines > CSV_INVALID with both lines, nothing is written', async () => {
    const reply = await hall.organiser.post(
      path(),
      csv(CSV.replace('2,100,0,0', '2,wide,0,0').concat('4,1,9\n')),
    );
    expect(reply).toMatchObject({
      status: 422,
      error: {
        code: 'CSV_INVALID',
        fields: [
          { path: 'text', code: 'CSV_NOT_A_NUMBER' },
          { path: 'text', code: 'CSV_MISSING_JOINT' },
        ],
      },
    });
    expect(reply.error?.message).toBe('truss.csv was not read: 2 lines are wrong.');
    expect(await list()).toEqual([]);
  });

  it('createFrame > a table > kept as it was typed, its source is the table', async () => {
    expect((await hall.organiser.post(path(), table())).status).toBe(201);
    const [frame] = await list();
    expect(frame).toMatchObject({ source: { kind: 'table' }, geometry });
    expect(await stored(hall, 'SELECT geometry FROM frame WHERE installation_id = ?')).toEqual([
      { geometry: JSON.stringify(geometry) },
    ]);
  });

  it('createFrame > a table with a loose joint, a doubled strut and a bad face > FRAME_INVALID, each at its row', async () => {
    const reply = await hall.organiser.post(
      path(),
      table({
        struts: [
          [0, 1],
          [1, 0],
        ],
        faces: [[0, 1, 2]],
      }),
    );
    expect(reply).toMatchObject({
      status: 422,
      error: {
        code: 'FRAME_INVALID',
        fields: [
          { path: 'geometry.struts.1', code: 'FRAME_DOUBLED_STRUT' },
          { path: 'geometry.faces.0', code: 'FRAME_BAD_FACE' },
          { path: 'geometry.faces.0', code: 'FRAME_BAD_FACE' },
          { path: 'geometry.joints.2', code: 'FRAME_LOOSE_JOINT' },
        ],
      },
    });
    expect(await list()).toEqual([]);
  });

  it('createFrame > a table with text for a coordinate and half a joint number > both fields named', async () => {
    const reply = await hall.organiser.post(
      path(),
      table({ joints: [{ x: 'left', y: 0, z: 0 }], struts: [[0, 0.5]] }),
    );
    expect(reply).toMatchObject({ status: 400, error: { code: 'VALIDATION' } });
    expect(reply.error?.fields?.map((field) => field.path)).toEqual([
      'geometry.joints.0.x',
      'geometry.struts.0.1',
    ]);
  });
});

describe('editFrame', () => {
  it('editFrame > from the page that is current > kept, from one older than another edit > STALE_PAGE, the newer one stays', async () => {
    const id = await add(table());
    const { revision } = (await list())[0]!;
    expect(await hall.organiser.put(`${path()}/${id}`, csv(CSV, { revision }))).toMatchObject({
      status: 200,
    });
    const newer = (await list())[0]!;
    expect(newer.revision).toBeGreaterThan(revision);
    const late = await hall.organiser.put(`${path()}/${id}`, table({}, { revision, name: 'Late' }));
    expect(late).toMatchObject({
      status: 409,
      error: { code: 'STALE_PAGE', details: { revision: newer.revision } },
    });
    expect(await list()).toEqual([newer]);
    expect(await logged(hall, 'frame.edited')).toHaveLength(1);
  });

  it('editFrame > without a revision > kept as before', async () => {
    const id = await add(table());
    expect(await hall.organiser.put(`${path()}/${id}`, csv(CSV))).toMatchObject({ status: 200 });
    expect((await list())[0]).toMatchObject({ source: { kind: 'csv' } });
  });

  it('editFrame > a frame that stands 150 times grows to 150 struts > refused with the numbers; to 100 > kept', async () => {
    const id = await add(table());
    await hall.organiser.post(`${hall.base}/placements`, {
      frameId: id,
      name: 'Row',
      at: { x: 0, y: 0, z: 0 },
      turn: { x: 0, y: 0, z: 0 },
      pattern: { kind: 'row', count: 150, step: { x: 0, y: 100, z: 0 } },
    });
    const refused = await hall.organiser.put(`${path()}/${id}`, table(chain(150)));
    expect(refused).toMatchObject({
      status: 400,
      error: { code: 'VALIDATION', fields: [{ path: 'geometry', code: 'too-many' }] },
    });
    expect(refused.error?.fields?.[0]?.message).toContain('22,500');
    expect((await list())[0]?.geometry.struts).toHaveLength(2);
    expect(await hall.organiser.put(`${path()}/${id}`, table(chain(100)))).toMatchObject({ status: 200 });
  });
});
