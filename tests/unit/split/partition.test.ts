import { describe, expect, it } from 'vitest';
import { Pieces } from '../../../shared/split/partition/anneal';
import {
  bitsOf,
  coordinateBisection,
  fieldJointsOf,
  netOf,
  partition,
  randomGrowth,
} from '../../../shared/split';
import { weightsOf } from '../../../shared/split/partition/net';
import type { Frame } from '../../../shared/frames';
import { seededRandom } from '../../../shared/kernel/random';
import { doubleLayerGrid, flatLattice } from '../../support/structures';

const net = (frame: Frame, weights = frame.struts.map(() => 1)) => netOf(frame.joints, frame.struts, weights);
/** A chain of struts along x, 100 mm each. */
const chain = (count: number): Frame => ({
  joints: Array.from({ length: count + 1 }, (_, k) => ({ x: 100 * k, y: 0, z: 0 })),
  struts: Array.from({ length: count }, (_, k) => [k, k + 1]),
  faces: [],
});

describe('fieldJointsOf', () => {
  it('fieldJointsOf > four struts at one joint in three pieces > two, and none where one piece is', () => {
    const star: Frame = {
      joints: [0, 1, 2, 3, 4].map((k) => ({ x: k, y: k * k, z: 0 })),
      struts: [
        [0, 1],
        [0, 2],
        [0, 3],
        [0, 4],
      ],
      faces: [],
    };
    expect(fieldJointsOf(net(star), [0, 1, 2, 2])).toBe(2);
    expect(fieldJointsOf(net(star), [0, 0, 0, 0])).toBe(0);
  });
});

describe('coordinateBisection', () => {
  it('coordinateBisection > a chain of ten in three pieces > floor(3 / 2) third first, then the rest halved', () => {
    expect([...coordinateBisection(net(chain(10)), 3)]).toEqual([0, 0, 0, 1, 1, 1, 1, 2, 2, 2]);
  });

  it('coordinateBisection > a lattice wider than deep > cut across its longest side first', () => {
    const pieceOf = coordinateBisection(net(flatLattice(6, 2)), 2);
    const frame = flatLattice(6, 2);
    frame.struts.forEach(([a, b], strut) => {
      const middle = ((frame.joints[a]?.x ?? 0) + (frame.joints[b]?.x ?? 0)) / 2;
      if (middle !== 1500) expect(pieceOf[strut]).toBe(middle < 1500 ? 0 : 1);
    });
  });
});

describe('randomGrowth', () => {
  it('randomGrowth > a connected lattice > every piece in one bit, the same for the same seed', () => {
    const lattice = net(flatLattice(7, 5));
    const pieceOf = randomGrowth(lattice, 6, 4);
    expect(bitsOf(lattice, pieceOf)).toHaveLength(6);
    expect([...randomGrowth(lattice, 6, 4)]).toEqual([...pieceOf]);
    expect([...randomGrowth(lattice, 6, 5)]).not.toEqual([...pieceOf]);
  });
});

describe('Pieces', () => {
  it('move > a thousand random moves > cost and weights are what a count from scratch gives, each change foretold', () => {
    const lattice = net(doubleLayerGrid(4, 4));
    const random = seededRandom(3);
    const start = randomGrowth(lattice, 5, 1);
    const pieces = new Pieces(
      lattice,
      { pieces: 5, least: 0, most: Infinity, fixed: null, random, goOn: () => true },
      start,
    );
    for (let turn = 0; turn < 1000; turn += 1) {
      const strut = Math.floor(random() * lattice.struts);
      const to = Math.floor(random() * 5);
      if (pieces.pieceOf[strut] === to) continue;
      const foretold = pieces.cost + pieces.change(strut, to);
      pieces.move(strut, to);
      expect(pieces.cost).toBe(foretold);
    }
    expect(pieces.cost).toBe(fieldJointsOf(lattice, pieces.pieceOf));
    expect([...pieces.weight]).toEqual([...weightsOf(lattice, pieces.pieceOf, 5)]);
  });

  it('holdsWithout > the strut that joins two halves, a strut at an open end, the only strut > no, yes, no', () => {
    const line = net(chain(4));
    const task = { pieces: 2, least: 0, most: 9, fixed: null, random: seededRandom(1), goOn: () => true };
    const pieces = new Pieces(line, task, [0, 0, 0, 1]);
    expect(pieces.holdsWithout(1)).toBe(false);
    expect(pieces.holdsWithout(0)).toBe(true);
    expect(pieces.holdsWithout(3)).toBe(false);
  });
});

describe('partition', () => {
  const lattice = flatLattice(8, 6);
  const wish = {
    joints: lattice.joints,
    struts: lattice.struts,
    weights: lattice.struts.map(() => 1),
    seed: 1,
  };

  it('partition > as many pieces as struts, and one > each its own, and all in one', () => {
    const small = chain(5);
    const of = (pieces: number) =>
      partition({ joints: small.joints, struts: small.struts, weights: [1, 1, 1, 1, 1], pieces, seed: 1 });
    expect(new Set(of(5).pieceOf).size).toBe(5);
    expect(of(5).fieldJoints).toBe(4);
    expect(of(1)).toMatchObject({ fieldJoints: 0, imbalancePct: 0, balanced: true });
  });

  it('partition > more pieces than struts, or none > said with both numbers', () => {
    expect(() => partition({ ...wish, pieces: 500 })).toThrow('110 struts cannot make 500 pieces');
    expect(() => partition({ ...wish, pieces: 0 })).toThrow(RangeError);
  });

  it('partition > struts that weigh more at one end > the weights are balanced, not the counts', () => {
    const weights = lattice.struts.map(([a]) => 1 + ((lattice.joints[a]?.x ?? 0) / 4000) * 4);
    const found = partition({ ...wish, weights, pieces: 4 });
    expect(found).toMatchObject({ balanced: true, disconnected: 0 });
    expect(found.imbalancePct).toBeLessThanOrEqual(10);
    const sizes = [0, 1, 2, 3].map((piece) => found.pieceOf.filter((own) => own === piece).length);
    expect(Math.max(...sizes) - Math.min(...sizes)).toBeGreaterThan(3);
  });

  it('partition > told to stop at once > the better of the two simple ways, made whole', () => {
    const found = partition({ ...wish, pieces: 5 }, { shouldStop: () => true });
    expect(found.disconnected).toBe(0);
    expect(found.fieldJoints).toBeLessThanOrEqual(
      Math.max(found.baseline.randomGrowth, found.baseline.coordinateBisection),
    );
  });
});
