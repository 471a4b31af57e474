import { describe, expect, it } from 'vitest';
import type { FrameView } from '../../../shared/contracts/frames';
import type { StepRecord } from '../../../shared/contracts/live';
import { handsWanted } from '../../../src/features/projector/hands-wanted';
import { litStruts } from '../../../src/features/projector/lit-struts';
import { pushedApart } from '../../../src/features/projector/pushed-apart';
import { sheetLayout, type Cell } from '../../../src/features/projector/sheet-layout';
import { strutStrokes } from '../../../src/features/projector/strut-strokes';
import { wallDrawing } from '../../../src/features/projector/wall-drawing';
import { STEP_STATES } from '../../../shared/travellers/step';
import { NOW, pieceRecord, stepRecord } from './fixtures';

const steps = (...given: [state: StepRecord['state'], seconds: number][]) =>
  given.map(([state, plannedSeconds], i) =>
    stepRecord({ id: `s${i}`, position: i + 1, state, plannedSeconds }),
  );

describe('litStruts', () => {
  it('litStruts > minutes of the steps differ > struts lit as passed minutes are of all, not as steps are', () => {
    expect(litStruts(steps(['passed', 600], ['in hand', 1800]), 12)).toEqual({ state: 'in hand', struts: 3 });
    expect(litStruts(steps(['passed', 1800], ['ready', 600]), 12)).toEqual({ state: 'ready', struts: 9 });
  });

  it('litStruts > all but the last second passed > one strut stays dark; all passed > none', () => {
    expect(litStruts(steps(['passed', 9999], ['to check', 1]), 12).struts).toBe(11);
    expect(litStruts(steps(['passed', 9999], ['passed', 1]), 12)).toEqual({ state: 'passed', struts: 12 });
  });

  it('litStruts > nothing passed yet > one strut shows that it is in work; a piece that waits shows none', () => {
    expect(litStruts(steps(['in hand', 600], ['waiting', 600]), 12).struts).toBe(1);
    expect(litStruts(steps(['waiting', 600]), 12)).toEqual({ state: 'waiting', struts: 0 });
    expect(litStruts([], 12)).toEqual({ state: 'waiting', struts: 0 });
    expect(litStruts(steps(['ready', 60]), 0).struts).toBe(0);
  });

  it('litStruts > a held step > the state of the piece is held', () => {
    const [step] = steps(['in hand', 600]);
    expect(litStruts([{ ...step!, held: { reason: 'x', by: 'y', at: NOW } }], 6).state).toBe('held');
  });
});

describe('sheetLayout', () => {
  const overlap = (a: Cell, b: Cell) =>
    a.x < b.x + b.width - 1e-6 &&
    b.x < a.x + a.width - 1e-6 &&
    a.y < b.y + b.height - 1e-6 &&
    b.y < a.y + a.height - 1e-6;

  it.each([1, 2, 7, 38, 300])(
    'sheetLayout > %i pieces, wide and slim > all on the sheet, none on another',
    (count) => {
      const aspects = Array.from({ length: count }, (_, i) => (i % 3 === 0 ? 2.6 : i % 3 === 1 ? 0.5 : 9));
      const cells = sheetLayout(aspects, 1220, 740);
      expect(cells).toHaveLength(count);
      for (const cell of cells) {
        expect(cell.x).toBeGreaterThanOrEqual(-1e-6);
        expect(cell.y).toBeGreaterThanOrEqual(-1e-6);
        expect(cell.x + cell.width).toBeLessThanOrEqual(1220 + 1e-6);
        expect(cell.y + cell.height).toBeLessThanOrEqual(740 + 1e-6);
      }
      cells.forEach((a, i) => cells.slice(i + 1).forEach((b) => expect(overlap(a, b)).toBe(false)));
    },
  );

  it('sheetLayout > no pieces > no places', () => {
    expect(sheetLayout([], 1220, 740)).toEqual([]);
  });
});

describe('pushedApart', () => {
  it('pushedApart > labels over each other > beside each other in their order, inside the line', () => {
    const at = pushedApart(
      [
        { at: 600, size: 150 },
        { at: 590, size: 150 },
        { at: 1210, size: 150 },
        { at: 5, size: 150 },
      ],
      1220,
    );
    expect(at).toEqual([740, 590, 1145, 75]);
  });
});

describe('handsWanted', () => {
  const bay = (code: string, list: StepRecord[]) => ({
    piece: pieceRecord({ id: code, code }),
    steps: list.map((step, i) => ({ ...step, id: `${code}-${i}`, subAssemblyId: code, position: i + 1 })),
  });

  it('handsWanted > a crew that waits for one more > before longer chains; each kind of step before any twice', () => {
    const cut = (seconds: number) => stepRecord({ name: 'cut', stationId: 'saw', plannedSeconds: seconds });
    const raise = stepRecord({
      name: 'raise',
      stationId: 'glue',
      state: 'in hand',
      crewMin: 2,
      crew: [{ personId: 'kofi', claimedAt: NOW }],
      plannedSeconds: 60,
    });
    const wanted = handsWanted(
      [
        bay('V-01', [cut(9000)]),
        bay('V-02', [cut(8000)]),
        bay('V-03', [raise]),
        bay('V-04', [stepRecord({ name: 'clean', plannedSeconds: 100 })]),
      ],
      NOW,
    );
    expect(wanted.map(({ code, hands }) => [code, hands])).toEqual([
      ['V-03', 1],
      ['V-01', 1],
      ['V-04', 1],
      ['V-02', 1],
    ]);
  });

  it('handsWanted > held, begun, waiting, passed, or paint not ready for it > nobody is called', () => {
    const coat = stepRecord({
      state: 'passed',
      clocks: { touchDry: 60, handleFrom: 3600 },
      finishedAt: NOW - 60_000,
    });
    const wanted = handsWanted(
      [
        bay('V-01', [stepRecord({ held: { reason: 'x', by: 'y', at: NOW } })]),
        bay('V-02', [stepRecord({ state: 'in hand', startedAt: NOW, crewMin: 3 })]),
        bay('V-03', [coat, stepRecord({ name: 'hang', operation: 'hang' })]),
      ],
      NOW,
    );
    expect(wanted).toEqual([]);
  });
});

describe('the drawing on the wall', () => {
  const [a, b] = [
    { x: 0, y: 0 },
    { x: 100, y: 0 },
  ];

  it('strutStrokes > all eight states > eight patterns that differ without colour', () => {
    const patterns = STEP_STATES.map((state) => JSON.stringify(strutStrokes(state, a, b, 1)));
    expect(new Set(patterns).size).toBe(8);
  });

  it('strutStrokes > a strut of no length > numbers all the same', () => {
    for (const state of STEP_STATES)
      expect(JSON.stringify(strutStrokes(state, a, a, 1))).not.toMatch(/NaN|null|Infinity/);
  });

  it('wallDrawing > one piece half passed > half its struts in its state, the others dotted; a piece without a frame is left out', () => {
    const frame: FrameView = {
      id: 'f1',
      name: 'square',
      revision: 1,
      source: { kind: 'obj', fileName: 'square.obj' },
      geometry: {
        joints: [
          { x: 0, y: 0, z: 0 },
          { x: 100, y: 0, z: 0 },
          { x: 100, y: 100, z: 0 },
          { x: 0, y: 100, z: 0 },
        ],
        struts: [
          [0, 1],
          [1, 2],
          [2, 3],
          [3, 0],
        ],
        faces: [],
      },
      subAssemblies: 1,
    };
    const { paths, cells } = wallDrawing(
      [
        { piece: pieceRecord({ id: 'v1' }), steps: steps(['passed', 600], ['ready', 600]) },
        { piece: pieceRecord({ id: 'v2', frameId: 'gone' }), steps: [] },
      ],
      new Map([['f1', frame]]),
      1220,
      740,
    );
    const count = (state: string) =>
      paths.filter((path) => path.state === state).reduce((sum, { d }) => sum + d.split('M').length - 1, 0);
    expect([count('ready'), count('waiting'), count('passed')]).toEqual([2, 2, 0]);
    expect([...cells.keys()]).toEqual(['v1']);
  });
});
