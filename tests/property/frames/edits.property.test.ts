import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  applyFrameEdit,
  buildShape,
  formatFrameCsv,
  parseFrameCsv,
  validateFrame,
  type Frame,
  type FrameEdit,
} from '../../../shared/frames';

const index = fc.nat(14);
const place = fc.record({
  x: fc.integer({ min: -500, max: 500 }),
  y: fc.integer({ min: -500, max: 500 }),
  z: fc.integer({ min: 0, max: 500 }),
});
const edit: fc.Arbitrary<FrameEdit> = fc.oneof(
  fc.record({ kind: fc.constant('add-joint' as const), at: place }),
  fc.record({ kind: fc.constant('move-joint' as const), joint: index, to: place }),
  fc.record({ kind: fc.constant('delete-joint' as const), joint: index }),
  fc.record({ kind: fc.constant('add-strut' as const), from: index, to: index }),
  fc.record({ kind: fc.constant('delete-strut' as const), strut: index }),
  fc.record({
    kind: fc.constant('split-strut' as const),
    strut: index,
    share: fc.double({ min: 0, max: 1, noNaN: true }),
  }),
  fc.record({ kind: fc.constant('merge-joints' as const), keep: index, drop: index }),
);
const START = buildShape({ kind: 'antiprism', sides: 4, baseBy: 'radius', baseMm: 200, uniform: true });
/** What a frame under edit may lack: struts at new joints. Nothing else may ever be wrong with it. */
const WHOLE_ENOUGH = new Set(['FRAME_LOOSE_JOINT', 'FRAME_WITHOUT_STRUTS']);

describe('applyFrameEdit', () => {
  it('applyFrameEdit > any run of changes > each leaves a sound frame, undone one by one it is the first again, redone the last', () => {
    fc.assert(
      fc.property(fc.array(edit, { maxLength: 25 }), (edits) => {
        const first = JSON.stringify(START);
        let frame: Frame = START;
        const undo: FrameEdit[] = [];
        for (const one of edits) {
          const result = applyFrameEdit(frame, one);
          if (!result.ok) continue;
          frame = result.value.frame;
          undo.push(result.value.inverse);
          const wrong = validateFrame(frame).filter(({ code }) => !WHOLE_ENOUGH.has(code));
          expect(wrong).toEqual([]);
        }
        const last = JSON.stringify(frame);
        const redo: FrameEdit[] = [];
        for (const [from, to] of [
          [undo, redo],
          [redo, undo],
        ] as const)
          for (let back = from.pop(); back; back = from.pop()) {
            const result = applyFrameEdit(frame, back);
            if (!result.ok) throw new Error(result.refusal.message);
            frame = result.value.frame;
            to.push(result.value.inverse);
            if (from === undo && undo.length === 0) expect(JSON.stringify(frame)).toBe(first);
          }
        expect(JSON.stringify(frame)).toBe(last);
      }),
      { seed: 4, numRuns: 200 },
    );
  });
});

describe('parseFrameCsv', () => {
  it('parseFrameCsv > whatever was edited and written > read back the same, with every digit', () => {
    fc.assert(
      fc.property(fc.array(edit, { maxLength: 25 }), (edits) => {
        let frame: Frame = START;
        for (const one of edits) {
          const result = applyFrameEdit(frame, one);
          if (result.ok) frame = result.value.frame;
        }
        fc.pre(validateFrame(frame).length === 0);
        expect(parseFrameCsv(formatFrameCsv(frame))).toEqual({ ok: true, value: { frame, notes: [] } });
      }),
      { seed: 5, numRuns: 200 },
    );
  });

  it('parseFrameCsv > any text at all > never throws; what it accepts is valid', () => {
    const word = fc.constantFrom(
      ...[
        'joint',
        'strut',
        'face',
        'x',
        'y',
        'z',
        'from',
        'to',
        '1',
        '2',
        '3',
        '-4.5',
        '1e9',
        'nan',
        '"',
        '',
      ],
    );
    const cells = fc.array(word, { maxLength: 6 }).map((row) => row.join(','));
    const text = fc.oneof(
      fc.string(),
      fc.array(cells, { maxLength: 20 }).map((rows) => rows.join('\n')),
    );
    fc.assert(
      fc.property(text, (input) => {
        const result = parseFrameCsv(input);
        if (result.ok) expect(validateFrame(result.value.frame)).toEqual([]);
        else expect(result.refusal.length).toBeGreaterThan(0);
      }),
      { seed: 6, numRuns: 2000 },
    );
  });
});
