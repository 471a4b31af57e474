import { describe, expect, it } from 'vitest';
import { copiesOf, copyPlaces, placeFrame, type Frame, type Pattern } from '../../../shared/frames';

const zero = { x: 0, y: 0, z: 0 };
const point = (x: number, y: number, z: number): Frame => ({ joints: [{ x, y, z }], struts: [], faces: [] });
const turned = (at: [number, number, number], turn: [number, number, number]) => {
  const [x, y, z] = turn;
  return placeFrame(point(...at), { at: zero, turn: { x, y, z } }).joints[0];
};

describe('placeFrame', () => {
  it('placeFrame > a quarter turn about each axis > right-handed and exact, without a trace of rounding', () => {
    expect(turned([1, 2, 3], [90, 0, 0])).toEqual({ x: 1, y: -3, z: 2 });
    expect(turned([1, 2, 3], [0, 90, 0])).toEqual({ x: 3, y: 2, z: -1 });
    expect(turned([1, 2, 3], [0, 0, 90])).toEqual({ x: -2, y: 1, z: 3 });
    expect(turned([1, 2, 3], [0, 0, -270])).toEqual({ x: -2, y: 1, z: 3 });
  });

  it('placeFrame > turns about several axes > about x first, then y, then z', () => {
    // (0, 0, 1) about x by 90 is (0, -1, 0); about y it stays; about z by 90 it is (1, 0, 0).
    expect(turned([0, 0, 1], [90, 90, 90])).toEqual({ x: 1, y: 0, z: 0 });
  });

  it('placeFrame > a turn and a position > turned about its own zero, then moved; struts and faces as they were', () => {
    const frame: Frame = { joints: [{ x: 100, y: 0, z: 0 }, zero], struts: [[0, 1]], faces: [] };
    const placed = placeFrame(frame, { at: { x: 5, y: 6, z: 7 }, turn: { x: 0, y: 0, z: 30 } });
    expect(placed.joints[0]!.x).toBeCloseTo(5 + 100 * Math.cos(Math.PI / 6), 9);
    expect(placed.joints[0]!.y).toBeCloseTo(6 + 50, 9);
    expect(placed.joints[1]).toEqual({ x: 5, y: 6, z: 7 });
    expect(placed.struts).toEqual([[0, 1]]);
  });
});

describe('copyPlaces', () => {
  const at = { x: 10, y: 20, z: 30 };
  const places = (pattern: Pattern) => copyPlaces({ at, turn: { x: 1, y: 2, z: 3 }, pattern });

  it('copyPlaces > a row of three > every step the same, turns as given', () => {
    const row = places({ kind: 'row', count: 3, step: { x: 100, y: 0, z: -5 } });
    expect(row.map((place) => place.at)).toEqual([
      { x: 10, y: 20, z: 30 },
      { x: 110, y: 20, z: 25 },
      { x: 210, y: 20, z: 20 },
    ]);
    expect(row.every(({ turn }) => turn.x === 1 && turn.y === 2 && turn.z === 3)).toBe(true);
  });

  it('copyPlaces > a ring of four, turned > round its centre from the x axis, each a quarter further about z', () => {
    const ring = places({ kind: 'ring', count: 4, radius: 500, turned: true });
    expect(ring.map(({ turn }) => turn.z)).toEqual([3, 93, 183, 273]);
    expect(ring[0]!.at).toEqual({ x: 510, y: 20, z: 30 });
    expect(ring[1]!.at.x).toBeCloseTo(10, 9);
    expect(ring[1]!.at.y).toBeCloseTo(520, 9);
  });

  it('copyPlaces > a ring that is not turned > same places, every copy turned as given', () => {
    const [still, turning] = [false, true].map((way) =>
      places({ kind: 'ring', count: 5, radius: 500, turned: way }),
    );
    expect(still!.map((place) => place.at)).toEqual(turning!.map((place) => place.at));
    expect(new Set(still!.map(({ turn }) => turn.z))).toEqual(new Set([3]));
  });

  it('copyPlaces > a grid of 2 by 3 by 2 > twelve places, x running fastest, then y, then z', () => {
    const pattern: Pattern = { kind: 'grid', counts: { x: 2, y: 3, z: 2 }, step: { x: 1, y: 10, z: 100 } };
    const grid = places(pattern).map((place) => [place.at.x - 10, place.at.y - 20, place.at.z - 30]);
    expect(copiesOf(pattern)).toBe(12);
    expect(grid.slice(0, 4)).toEqual([
      [0, 0, 0],
      [1, 0, 0],
      [0, 10, 0],
      [1, 10, 0],
    ]);
    expect(grid.at(-1)).toEqual([1, 20, 100]);
    expect(new Set(grid.map(String)).size).toBe(12);
  });
});
