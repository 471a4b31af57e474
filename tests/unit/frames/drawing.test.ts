import { describe, expect, it } from 'vitest';
import {
  buildShape,
  joinDrawing,
  separateShapes,
  validateFrame,
  type Frame,
  type PlacedFrame,
} from '../../../shared/frames';

const zero = { x: 0, y: 0, z: 0 };
const placed = (id: string, x: number, part: Partial<PlacedFrame> = {}): PlacedFrame => ({
  id,
  frameId: 'cube',
  at: { x, y: 0, z: 0 },
  turn: zero,
  pattern: { kind: 'single' },
  ...part,
});
const cube = buildShape({ kind: 'cube', edgeMm: 200 });
const stick = (length: number): Frame => ({
  joints: [zero, { x: length, y: 0, z: 0 }],
  struts: [[0, 1]],
  faces: [],
});
const frames = new Map([['cube', cube]]);

describe('joinDrawing', () => {
  it('joinDrawing > two cubes side by side > 12 joints, 20 struts, 11 faces, the four shared struts named with their twins', () => {
    const { frame, sources, doubled, vanished, movedMm } = joinDrawing(
      [placed('a', 0), placed('b', 200)],
      frames,
      1,
    );
    expect([frame.joints.length, frame.struts.length, frame.faces.length]).toEqual([12, 20, 11]);
    expect(validateFrame(frame)).toEqual([]);
    expect(doubled).toHaveLength(4);
    expect(doubled.every(({ kept, left }) => kept[0] === 'a' && left[0] === 'b')).toBe(true);
    expect(vanished).toEqual([]);
    expect(movedMm).toBeLessThan(1e-9);
    expect(sources).toHaveLength(20);
    expect(sources.filter(([id]) => id === 'b').map(([, , strut]) => strut)).not.toContain(
      doubled[0]!.left[2],
    );
  });

  it('joinDrawing > cubes 0.9 mm and 1.1 mm apart, tolerance 1 mm > joined, and not joined', () => {
    const joints = (gap: number) =>
      joinDrawing([placed('a', 0), placed('b', 200 + gap)], frames, 1).frame.joints.length;
    expect(joints(0.9)).toBe(12);
    expect(joints(1.1)).toBe(16);
  });

  it('joinDrawing > joined joints > stand where the first of them stood, and the pull is said', () => {
    const { frame, movedMm } = joinDrawing([placed('a', 0), placed('b', 200.9)], frames, 1);
    expect(frame.joints.slice(0, 8)).toEqual(cube.joints);
    expect(movedMm).toBeCloseTo(0.9, 9);
  });

  it('joinDrawing > a chain of near joints > one joint whatever the order of the placements', () => {
    const dots = new Map([['stick', stick(1000)]]);
    const at = (id: string, y: number) => placed(id, 0, { frameId: 'stick', at: { x: 0, y, z: 0 } });
    const chain = [at('a', 0), at('b', 0.8), at('c', 1.6)];
    for (const order of [
      [0, 1, 2],
      [0, 2, 1],
      [2, 0, 1],
    ]) {
      const { frame, doubled } = joinDrawing(
        order.map((index) => chain[index]!),
        dots,
        1,
      );
      expect([frame.joints.length, frame.struts.length, doubled.length]).toEqual([2, 1, 2]);
    }
  });

  it('joinDrawing > a strut shorter than the tolerance > named as vanished, its faces keep their other corners', () => {
    const sliver: Frame = {
      joints: [zero, { x: 100, y: 0, z: 0 }, { x: 100, y: 0.5, z: 0 }, { x: 0, y: 100, z: 0 }],
      struts: [
        [0, 1],
        [1, 2],
        [2, 3],
        [3, 0],
      ],
      faces: [[0, 1, 2, 3]],
    };
    const { frame, vanished } = joinDrawing(
      [placed('a', 0, { frameId: 'sliver' })],
      new Map([['sliver', sliver]]),
      1,
    );
    expect(vanished).toEqual([['a', 0, 1]]);
    expect([frame.joints.length, frame.struts.length]).toEqual([3, 3]);
    expect(frame.faces).toEqual([[0, 1, 2]]);
  });

  it('joinDrawing > copies and a frame that is gone > every strut knows its copy, the placement without a frame is named', () => {
    const row = placed('row', 0, { pattern: { kind: 'row', count: 3, step: { x: 500, y: 0, z: 0 } } });
    const { frame, sources, missing } = joinDrawing([row, placed('lost', 0, { frameId: 'gone' })], frames, 1);
    expect(frame.struts).toHaveLength(36);
    expect(sources[0]).toEqual(['row', 0, 0]);
    expect(sources[35]).toEqual(['row', 2, 11]);
    expect(missing).toEqual(['lost']);
  });

  it('joinDrawing > tolerance of 0, turned by 30 degrees twelve times > what differs by rounding alone is one', () => {
    const ring = placed('ring', 0, {
      frameId: 'stick',
      pattern: { kind: 'ring', count: 12, radius: 1000, turned: true },
    });
    // Each stick runs from the ring to its centre.
    const inward = new Map([['stick', { ...stick(-1000), faces: [] }]]);
    const { frame } = joinDrawing([ring], inward, 0);
    expect(frame.joints).toHaveLength(13);
  });

  it('joinDrawing > 20,000 joints in a row of ten > without comparing every pair', () => {
    const joints = Array.from({ length: 2000 }, (_, at) => ({
      x: (at % 25) * 300,
      y: (Math.floor(at / 25) % 20) * 300,
      z: Math.floor(at / 500) * 300,
    }));
    const struts = joints.slice(500).map((_, at): [number, number] => [at, at + 500]);
    const pattern = { kind: 'row', count: 10, step: { x: 7500, y: 0, z: 0 } } as const;
    const began = performance.now();
    const { frame } = joinDrawing(
      [placed('row', 0, { frameId: 'tower', pattern })],
      new Map([['tower', { joints, struts, faces: [] }]]),
      1,
    );
    expect(frame.joints).toHaveLength(20_000);
    // 0.1 s on an idle machine; comparing every pair would take longer than this on any.
    expect(performance.now() - began).toBeLessThan(3000);
  });
});

describe('separateShapes', () => {
  it('separateShapes > two cubes that touch at a corner and one alone > two shapes, struts in order', () => {
    const at = (id: string, x: number, y: number, z: number) => placed(id, 0, { at: { x, y, z } });
    const { frame } = joinDrawing([at('a', 0, 0, 0), at('b', 900, 0, 0), at('c', 200, 200, 200)], frames, 1);
    const shapes = separateShapes(frame);
    expect(shapes.map((struts) => struts.length)).toEqual([24, 12]);
    expect(shapes[0]).toEqual([...Array(12).keys(), ...Array.from({ length: 12 }, (_, at) => 24 + at)]);
    expect(shapes[1]![0]).toBe(12);
  });

  it('separateShapes > no struts > no shapes', () => {
    expect(separateShapes({ joints: [zero], struts: [], faces: [] })).toEqual([]);
  });
});
