import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { DrawingView } from '../../shared/contracts/drawing';
import type { RunView } from '../../shared/contracts/runs';
import {
  DEFAULT_SPLIT_WISH,
  type PieceSheet,
  type SplitPlan,
  type SplitView,
  type SplitWish,
} from '../../shared/contracts/split';
import { defaultTemplateSteps } from '../../shared/travellers/default-template';
import { rows } from '../support/fixtures-accounts';
import { logged, openHall, type Hall } from '../support/fixtures-safety';

// The computations run in a thread of their own and take the time that the machine gives them.
vi.setConfig({ testTimeout: 90_000 });

let hall: Hall;
let cubeId: string;
let templateId: string;

beforeEach(async () => {
  hall = await openHall();
  cubeId = (
    await hall.organiser.post<{ id: string }>(`${hall.base}/frames`, {
      kind: 'shape',
      name: 'Cube',
      shape: { kind: 'cube', edgeMm: 400 },
    })
  ).data.id;
  templateId = (
    await hall.organiser.post<{ id: string }>(`${hall.base}/templates`, {
      name: 'Usual',
      steps: defaultTemplateSteps([
        { id: hall.glueId, kind: 'glue' },
        { id: hall.paintId, kind: 'paint bay' },
      ]),
    })
  ).data.id;
});
afterEach(() => hall.server.close());

/** A wall of cubes that share their faces: 6 by 4 cubes are 24 shapes and one connected lattice. */
const place = (body: object = {}) =>
  hall.organiser.post<{ id: string; revision: number }>(`${hall.base}/placements`, {
    frameId: cubeId,
    name: 'Wall',
    at: { x: 0, y: 0, z: 0 },
    turn: { x: 0, y: 0, z: 0 },
    pattern: { kind: 'grid', counts: { x: 6, y: 4, z: 1 }, step: { x: 400, y: 400, z: 400 } },
    ...body,
  });

const wish = (change: Partial<SplitWish> = {}): SplitWish => ({
  ...DEFAULT_SPLIT_WISH,
  mostStruts: 40,
  box: null,
  mostKg: null,
  ...change,
});

/** Start a split and wait for its end. */
async function run(body: SplitWish): Promise<RunView> {
  const started = await hall.organiser.post<RunView>(`${hall.base}/split/runs`, body);
  expect(started.status).toBe(202);
  return vi.waitFor(
    async () => {
      const { data } = await hall.organiser.get<RunView>(`${hall.base}/runs/${started.data.id}`);
      if (data.status === 'running') throw new Error('still running');
      return data;
    },
    { timeout: 60_000, interval: 50 },
  );
}
const splits = async () =>
  (await hall.organiser.get<{ proposed: SplitView | null; taken: SplitView | null }>(`${hall.base}/split`))
    .data;
async function proposal(body = wish()): Promise<SplitView> {
  expect(await run(body)).toMatchObject({ status: 'done', problem: null });
  const { proposed } = await splits();
  if (!proposed) throw new Error('there is no proposal');
  return proposed;
}
const take = (revision: number, change: object = {}) =>
  hall.organiser.post<{
    added: string[];
    redrawn: string[];
    unchanged: number;
    removed: string[];
    fieldJoints: number;
  }>(`${hall.base}/split/take`, {
    templateId,
    letter: 'V',
    name: 'Bay',
    stationId: hall.glueId,
    begun: 'refuse',
    revision,
    ...change,
  });
const strutsIn = (plan: SplitPlan) => plan.pieces.flatMap((piece) => piece.struts).sort((a, b) => a - b);

describe('drawing', () => {
  it('savePlacement > a frame placed, moved by an old page, taken out > kept, refused with STALE_PAGE, gone; every step logged', async () => {
    const made = await place();
    expect(made.status).toBe(201);
    const view = (await hall.organiser.get<DrawingView>(`${hall.base}/drawing`)).data;
    expect(view.placements).toMatchObject([{ id: made.data.id, name: 'Wall', pattern: { kind: 'grid' } }]);
    const path = `${hall.base}/placements/${made.data.id}`;
    const { id: _id, ...whole } = view.placements[0] as DrawingView['placements'][number];
    const moved = await hall.organiser.put<{ revision: number }>(path, {
      ...whole,
      at: { x: 5, y: 0, z: 0 },
    });
    expect(moved.data.revision).toBeGreaterThan(made.data.revision);
    expect((await hall.organiser.put(path, whole)).error?.code).toBe('STALE_PAGE');
    expect((await hall.organiser.delete(path)).status).toBe(200);
    expect((await hall.organiser.get<DrawingView>(`${hall.base}/drawing`)).data.placements).toEqual([]);
    for (const action of ['placement.added', 'placement.edited', 'placement.removed'])
      expect(await logged(hall, action)).toHaveLength(1);
  });

  it('savePlacement > more struts than a drawing takes > refused at the pattern with the numbers', async () => {
    const reply = await place({
      pattern: { kind: 'grid', counts: { x: 50, y: 50, z: 1 }, step: { x: 400, y: 400, z: 0 } },
    });
    expect(reply.error?.fields).toEqual([
      expect.objectContaining({
        path: 'pattern',
        message: expect.stringContaining('30,000 struts') as string,
      }),
    ]);
  });

  it('removeFrame > a frame that stands in the drawing > IN_USE says how often', async () => {
    await place();
    const reply = await hall.organiser.delete(`${hall.base}/frames/${cubeId}`);
    expect(reply.error).toMatchObject({ code: 'IN_USE', details: { places: 1 } });
  });

  it('saveDrawingSettings > by an organiser, then by an old page > kept, then STALE_PAGE', async () => {
    const { settings, settingsRevision } = (await hall.organiser.get<DrawingView>(`${hall.base}/drawing`))
      .data;
    const body = { ...settings, strutDiameterMm: 12, revision: settingsRevision };
    expect((await hall.organiser.put(`${hall.base}/drawing/settings`, body)).status).toBe(200);
    expect((await hall.organiser.put(`${hall.base}/drawing/settings`, body)).error?.code).toBe('STALE_PAGE');
  });
});

describe('split', () => {
  it('startSplit > nothing drawn > DRAWING_EMPTY', async () => {
    const reply = await hall.organiser.post(`${hall.base}/split/runs`, wish());
    expect(reply.error?.code).toBe('DRAWING_EMPTY');
  });

  it('startSplit > a lattice of 24 cubes, at most 40 struts in a piece > every strut in one piece, none too large, moves for each, kept as a proposal', async () => {
    await place();
    const { plan, status, outOfDate } = await proposal();
    expect({ status, outOfDate }).toEqual({ status: 'proposed', outOfDate: false });
    // 6 by 4 cubes: 7 x 5 joints twice, 2 x (6 x 5 + 7 x 4) + 35 struts.
    expect(plan.figures.struts).toBe(151);
    expect(strutsIn(plan)).toEqual(Array.from({ length: 151 }, (_, strut) => strut));
    expect(Math.max(...plan.pieces.map((piece) => piece.struts.length))).toBeLessThanOrEqual(40);
    expect(plan.pieces.length).toBeGreaterThanOrEqual(4);
    for (const group of plan.groups) {
      const glued = group.moves.flatMap((move) => move.struts).sort((a, b) => a - b);
      expect(new Set(glued).size).toBe(group.frame.struts.length);
    }
    expect(plan.figures.fieldJoints).toBeLessThanOrEqual(plan.figures.baseline.coordinateBisection ?? 0);
  });

  it('startSplit > a strut longer than the box > the run fails in words that name strut and limit', async () => {
    await place();
    const ended = await run(wish({ box: { x: 300, y: 300, z: 300 } }));
    expect(ended.status).toBe('failed');
    expect(ended.problem?.message).toMatch(/Strut 1, .* breaks a limit by itself: .*does not fit the box/);
  });

  it('moveStruts > a strut given to a neighbour > figures follow at once; one that would tear a piece apart is refused', async () => {
    await place();
    const { plan, revision } = await proposal();
    const meeting = plan.meetings[0];
    const from = plan.pieces.find((piece) => piece.key === meeting?.b);
    const move = (strut: number, at: number) =>
      hall.organiser.post<SplitView>(`${hall.base}/split/move`, {
        struts: [strut],
        to: meeting?.a,
        revision: at,
      });
    let given: SplitView | null = null;
    let torn = 0;
    for (const strut of from?.struts ?? []) {
      const reply = await move(strut, revision);
      if (reply.status === 200) {
        given = reply.data;
        const owner = given.plan.pieces.find((piece) => piece.struts.includes(strut));
        expect(owner?.key).toBe(meeting?.a);
        break;
      }
      expect(reply.error?.code).toBe('SPLIT_IMPOSSIBLE');
      torn += 1;
    }
    expect(given?.plan.pieces.length).toBe(plan.pieces.length);
    expect(torn).toBeLessThan(from?.struts.length ?? 0);
    expect((await move(0, revision)).error?.code).toBe('STALE_PAGE');
  });

  it('takeSplit > from a proposal > pieces with travellers and codes, field joints that wait for both, the proposal taken', async () => {
    await place();
    const { plan, revision } = await proposal();
    const taken = await take(revision);
    expect(taken.status).toBe(201);
    expect(taken.data.added).toHaveLength(plan.pieces.length);
    expect(taken.data.fieldJoints).toBe(plan.meetings.length);
    const joints = await rows<{ needs: string; state: string; hazards: string }>(
      hall.server,
      `SELECT needs, step.state, step.hazards FROM sub_assembly JOIN step ON step.sub_assembly_id = sub_assembly.id WHERE kind = 'field joint'`,
    );
    expect(joints).toHaveLength(plan.meetings.length);
    for (const joint of joints) {
      expect(JSON.parse(joint.needs)).toHaveLength(2);
      expect(joint.state).toBe('waiting');
    }
    const after = await splits();
    expect(after.proposed).toBeNull();
    expect(after.taken?.id).toBeDefined();
    expect(await logged(hall, 'split.taken')).toHaveLength(1);
  });

  it('sheetOf > one piece > its drawing, moves that glue every strut, and the tape for each neighbour', async () => {
    await place();
    const { revision } = await proposal();
    await take(revision);
    const [piece] = await rows<{ id: string }>(
      hall.server,
      `SELECT id FROM sub_assembly WHERE code = 'V-01'`,
    );
    const sheet = (
      await hall.organiser.get<PieceSheet>(`${hall.base}/sub-assemblies/${piece?.id ?? ''}/sheet`)
    ).data;
    expect(sheet).toMatchObject({ code: 'V-01', travellerRevision: 1 });
    expect(new Set(sheet.moves.flatMap((move) => move.struts)).size).toBe(sheet.frame.struts.length);
    expect(sheet.meetings.length).toBeGreaterThan(0);
    expect(sheet.meetings[0]?.tape).toMatch(/^V-\d\d\/\d+( = V-\d\d\/\d+)+$/);
  });

  it('takeSplit > again after work has begun on a piece > that piece stays as it is, whatever is asked; the rest changes under its codes', async () => {
    await place();
    const first = await proposal();
    await take(first.revision);
    const [begun] = await rows<{ id: string; origin: string; step: string }>(
      hall.server,
      `SELECT sub_assembly.id, origin, step.id AS step FROM sub_assembly JOIN step ON step.sub_assembly_id = sub_assembly.id
       WHERE code = 'V-02' AND step.position = 1`,
    );
    await hall.server.app.deps.data.writer.query(`UPDATE step SET state = 'passed' WHERE id = ?`, [
      begun?.step,
    ]);
    const second = await proposal(wish({ mostStruts: 25, seed: 9 }));
    const before = JSON.parse(begun?.origin ?? '{}') as { struts: unknown[] };
    const taken = await take(second.revision);
    expect(taken.status).toBe(201);
    const [after] = await rows<{ origin: string; traveller_revision: number }>(
      hall.server,
      `SELECT origin, traveller_revision FROM sub_assembly WHERE code = 'V-02'`,
    );
    const kept = JSON.parse(after?.origin ?? '{}') as { struts: unknown[] };
    expect(kept.struts.map(String).sort()).toEqual(before.struts.map(String).sort());
    expect(after?.traveller_revision).toBe(1);
    expect(taken.data.redrawn.length + taken.data.added.length).toBeGreaterThan(0);
  });

  it('takeSplit > work begins on a piece between the proposal and the taking > SPLIT_WORK_BEGUN with the list, nothing changed', async () => {
    await place();
    const first = await proposal();
    await take(first.revision);
    const second = await proposal(wish({ mostStruts: 25, seed: 9 }));
    await hall.server.app.deps.data.writer.query(
      `UPDATE step SET state = 'passed' WHERE position = 1 AND sub_assembly_id IN (SELECT id FROM sub_assembly WHERE kind = 'piece')`,
    );
    const reply = await take(second.revision);
    expect(reply.error?.code).toBe('SPLIT_WORK_BEGUN');
    expect((reply.error?.details as { touched: { code: string }[] }).touched.length).toBeGreaterThan(0);
    expect((await splits()).proposed?.id).toBe(second.id);
  });

  it('takeSplit > the same, leaving begun work as it is > the begun piece keeps its struts, every strut is in one piece, the rest is taken', async () => {
    await place();
    const first = await proposal();
    await take(first.revision);
    const second = await proposal(wish({ mostStruts: 25, seed: 9 }));
    await hall.server.app.deps.data.writer.query(
      `UPDATE step SET state = 'passed' WHERE position = 1 AND sub_assembly_id IN (SELECT id FROM sub_assembly WHERE code = 'V-03')`,
    );
    const struts = async () =>
      (
        await rows<{ code: string; origin: string }>(
          hall.server,
          `SELECT code, origin FROM sub_assembly WHERE kind = 'piece' AND removed_at IS NULL ORDER BY code`,
        )
      ).map((row) => ({
        code: row.code,
        struts: (JSON.parse(row.origin) as { struts: unknown[] }).struts.map(String).sort(),
      }));
    const before = (await struts()).find((piece) => piece.code === 'V-03');
    expect((await take(second.revision, { begun: 'leave' })).status).toBe(201);
    const after = await struts();
    expect(after.find((piece) => piece.code === 'V-03')).toEqual(before);
    const all = after.flatMap((piece) => piece.struts);
    expect(all).toHaveLength(151);
    expect(new Set(all).size).toBe(151);
  });

  it('takeSplit > the drawing changed since > SPLIT_OUT_OF_DATE; an old page > STALE_PAGE', async () => {
    await place();
    const { revision } = await proposal();
    expect((await take(revision - 1)).error?.code).toBe('STALE_PAGE');
    await place({ name: 'One more', at: { x: 9000, y: 0, z: 0 }, pattern: { kind: 'single' } });
    expect((await take(revision)).error?.code).toBe('SPLIT_OUT_OF_DATE');
  });

  it('stop > a long split is stopped > it ends within a second with what it has', async () => {
    const lattice = { kind: 'grid', counts: { x: 16, y: 12, z: 8 }, step: { x: 400, y: 400, z: 400 } };
    expect((await place({ pattern: lattice })).status).toBe(201);
    const started = await hall.organiser.post<RunView>(
      `${hall.base}/split/runs`,
      wish({ pieces: 60, mostStruts: null }),
    );
    const path = `${hall.base}/runs/${started.data.id}`;
    await vi.waitFor(
      async () => {
        const { data } = await hall.organiser.get<RunView>(path);
        if (data.share === 0) throw new Error('not under way yet');
      },
      { timeout: 10_000, interval: 50 },
    );
    const asked = performance.now();
    await hall.organiser.delete(path);
    await vi.waitFor(
      async () => {
        const { data } = await hall.organiser.get<RunView>(path);
        if (data.status !== 'stopped') throw new Error(`still ${data.status}`);
      },
      { timeout: 5000, interval: 20 },
    );
    expect(performance.now() - asked).toBeLessThan(1200);
  });
});
