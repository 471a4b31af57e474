import { describe, expect, it } from 'vitest';
import { assemblyOrder, buildShape } from '../../../shared/frames';
import type { Frame } from '../../../shared/frames';

describe('assemblyOrder', () => {
  it('pyramid of six sides > ordered > the base ring first as a flat from joint 1, then raised', () => {
    const frame = buildShape({ kind: 'pyramid', sides: 6, baseBy: 'edge', baseMm: 100, heightMm: 300 });
    const order = assemblyOrder(frame).map((strut) => frame.struts[strut]!);
    expect(order.slice(0, 6).every(([a, b]) => a < 6 && b < 6)).toBe(true);
    expect(order[0]).toContain(0);
    expect(order.slice(6).every((strut) => strut.includes(6))).toBe(true);
  });

  it('triangles after the base > ordered > the face that needs fewest struts is closed first', () => {
    const frame = buildShape({ kind: 'tetrahedron', edgeMm: 100 });
    const order = assemblyOrder(frame).map((strut) => frame.struts[strut]!);
    const raised = order.slice(3);
    expect(raised).toHaveLength(3);
    expect(raised.every((strut) => strut.includes(3))).toBe(true);
  });

  it('prism of six sides > ordered > after base and first wall the wall next to it, which needs two struts', () => {
    const frame = buildShape({ kind: 'prism', sides: 6, baseBy: 'edge', baseMm: 100, heightMm: 300 });
    const order = assemblyOrder(frame).map((strut) => frame.struts[strut]!);
    const reached = (count: number) => new Set(order.slice(0, count).flat()).size;
    expect([6, 9, 11, 13].map(reached)).toEqual([6, 8, 9, 10]);
  });

  it('frame without faces > ordered > closes a ring before it reaches out', () => {
    const frame: Frame = {
      joints: Array.from({ length: 4 }, (_, at) => ({ x: at * 50, y: (at % 2) * 50, z: 0 })),
      struts: [
        [0, 1],
        [2, 3],
        [0, 2],
        [1, 2],
      ],
      faces: [],
    };
    expect(assemblyOrder(frame)).toEqual([0, 2, 3, 1]);
  });

  it('two separate parts > ordered > the part of joint 1 whole, then the other', () => {
    const frame: Frame = {
      joints: Array.from({ length: 5 }, (_, at) => ({ x: at * 50, y: at * at, z: 0 })),
      struts: [
        [3, 4],
        [0, 1],
        [1, 2],
      ],
      faces: [],
    };
    expect(assemblyOrder(frame)).toEqual([1, 2, 0]);
  });
});
