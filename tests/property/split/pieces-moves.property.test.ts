import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildShape } from '../../../shared/frames';
import type { Frame, Joint, Strut } from '../../../shared/frames';
import { seededRandom } from '../../../shared/kernel/random';
import { assemblyMoves, chooseFlats, moveText, strutNames } from '../../../shared/split/pieces';
import type { Move } from '../../../shared/split/pieces';
import { draw, movedFrame, randomFrame } from './pieces-arbitrary';

/** A connected part of a lattice with diagonals: rings in many planes, struts through rings. */
function latticePart(seed: number): Frame {
  const random = seededRandom(seed);
  const joints: Joint[] = [];
  for (let x = 0; x < 3; x++)
    for (let y = 0; y < 3; y++)
      for (let z = 0; z < 2; z++) joints.push({ x: 200 * x, y: 200 * y, z: 200 * z });
  const struts: Strut[] = [];
  joints.forEach((p, a) =>
    joints.forEach((q, b) => {
      const mm = Math.hypot(p.x - q.x, p.y - q.y, p.z - q.z);
      const share = mm < 201 ? 0.8 : mm < 284 ? 0.1 : mm < 347 ? 0.05 : 0;
      if (a < b && random() < share) struts.push([a, b]);
    }),
  );
  const reached = new Set([0]);
  for (let grown = true; grown;) {
    grown = false;
    for (const [a, b] of struts)
      if (reached.has(a) !== reached.has(b)) {
        reached.add(a).add(b);
        grown = true;
      }
  }
  const kept = [...reached].sort((a, b) => a - b);
  return {
    joints: kept.map((joint) => joints[joint]!),
    struts: struts.filter(([a]) => reached.has(a)).map(([a, b]): Strut => [kept.indexOf(a), kept.indexOf(b)]),
    faces: [],
  };
}

const SOLIDS = (['cube', 'octahedron', 'dodecahedron', 'icosahedron', 'tetrahedron'] as const).map((kind) =>
  buildShape({ kind, edgeMm: 150 }),
);
const anyConnected = fc.oneof(
  fc.integer().map(latticePart),
  fc.integer().map((seed) => {
    const random = seededRandom(seed);
    return randomFrame(random, 3 + draw(random, 14), draw(random, 24));
  }),
  fc.integer().map((seed) => {
    const random = seededRandom(seed);
    return movedFrame(random, SOLIDS[draw(random, SOLIDS.length)]!, false);
  }),
);

/** Plays the moves on a table of what is there; fails where a move starts from nothing. */
function play(frame: Frame, moves: readonly Move[], flats: readonly { joints: number[] }[]): Set<number> {
  const there = new Set<number>(flats[0]?.joints ?? []);
  const place = (flat: number) => flats[flat]!.joints.forEach((joint) => there.add(joint));
  for (const move of moves) {
    const before = new Set(there);
    switch (move.kind) {
      case 'begin':
        // A connected piece begins once, and only where there is no flat.
        expect(there.size).toBe(0);
        move.joints.forEach((joint) => there.add(joint));
        break;
      case 'lay':
        expect(move.joints.every((joint) => flats[move.flat]!.joints.includes(joint))).toBe(true);
        break;
      case 'join':
        expect(move.joints.length).toBeGreaterThan(0);
        expect(
          move.joints.every((joint) => before.has(joint) && flats[move.flat]!.joints.includes(joint)),
        ).toBe(true);
        place(move.flat);
        break;
      case 'raise': {
        const from = move.joints.slice(0, -1);
        expect(from.every((joint) => before.has(joint))).toBe(true);
        expect(before.has(move.joint)).toBe(false);
        expect(move.struts.map((strut) => [...frame.struts[strut]!].sort())).toEqual(
          from.map((joint) => [joint, move.joint].sort()),
        );
        there.add(move.joint);
        break;
      }
      case 'strut': {
        const [from, to] = move.joints;
        expect(before.has(from!)).toBe(true);
        if (move.hold?.first) {
          expect(flats[move.hold.flat]!.joints).toContain(to);
          place(move.hold.flat);
        } else expect(before.has(to!)).toBe(true);
        expect([...frame.struts[move.struts[0]!]!].sort()).toEqual([from, to].sort());
        break;
      }
      case 'flat':
      case 'brace':
      case 'glue-out':
      case 'take-off':
      case 'clean':
      case 'mark':
        break;
    }
  }
  return there;
}

describe('assemblyMoves', () => {
  it('any connected piece > ordered > numbered, every strut once, each move starts from what is there', () => {
    fc.assert(
      fc.property(anyConnected, (frame) => {
        const { flats } = chooseFlats(frame);
        const moves = assemblyMoves(frame, flats);
        expect(moves.map(({ number }) => number)).toEqual(moves.map((_, at) => at + 1));
        const glued = moves.flatMap(({ struts }) => struts);
        expect([...glued].sort((a, b) => a - b)).toEqual(frame.struts.map((_, strut) => strut));
        const there = play(frame, moves, flats);
        expect(there.size).toBe(frame.joints.length);
      }),
      { numRuns: 150 },
    );
  });

  it('any connected piece > ordered > flats before all else, then lifting, then second layer and cleaning', () => {
    const stage: Record<Move['kind'], number> = {
      flat: 0,
      lay: 0,
      begin: 1,
      brace: 1,
      join: 1,
      raise: 1,
      strut: 1,
      'glue-out': 2,
      'take-off': 3,
      clean: 4,
      mark: 5,
    };
    fc.assert(
      fc.property(anyConnected, (frame) => {
        const stages = assemblyMoves(frame, chooseFlats(frame).flats).map(({ kind }) => stage[kind]);
        expect(stages).toEqual([...stages].sort((a, b) => a - b));
      }),
      { numRuns: 50 },
    );
  });

  it('any connected piece > braced > sticks only where no strut is, each taken off once', () => {
    fc.assert(
      fc.property(anyConnected, (frame) => {
        const moves = assemblyMoves(frame, chooseFlats(frame).flats);
        const name = ([a, b]: readonly [number, number]) => `${Math.min(a, b)}-${Math.max(a, b)}`;
        const joined = new Set(frame.struts.map(name));
        const put = moves.flatMap((move) => (move.kind === 'brace' ? move.braces : []));
        const off = moves.flatMap((move) => (move.kind === 'take-off' ? move.braces : []));
        for (const pair of put) expect(joined.has(name(pair))).toBe(false);
        expect(off).toEqual(put);
      }),
      { numRuns: 50 },
    );
  });

  it('any connected piece > worded in both units > numbers from 1, no hole in the text', () => {
    fc.assert(
      fc.property(anyConnected, fc.constantFrom('mm' as const, 'inch' as const), (frame, unit) => {
        const names = strutNames(frame);
        assemblyMoves(frame, chooseFlats(frame).flats).forEach((move, at) => {
          const text = moveText(move, names, unit);
          expect(text.startsWith(`Move ${at + 1}. `)).toBe(true);
          expect(text).not.toMatch(/undefined|NaN|joint 0\b|strut 0\b|\(, | {2}/);
          expect(text.endsWith('.')).toBe(true);
        });
      }),
      { numRuns: 50 },
    );
  });
});
