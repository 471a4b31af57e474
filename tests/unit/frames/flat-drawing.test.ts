import { describe, expect, it } from 'vitest';
import { buildShape, flatDrawing, wireframeThumbnail } from '../../../shared/frames';
import type { Frame, Shape } from '../../../shared/frames';

const page = { width: 600, height: 480 };
const cube = buildShape({ kind: 'cube', edgeMm: 300 });
const box = buildShape({ kind: 'prism', sides: 4, baseBy: 'edge', baseMm: 200, heightMm: 500 });
const bay: Shape = {
  kind: 'vault-bay',
  lengthMm: 1000,
  widthMm: 2700,
  riseMm: 400,
  divisionsAlong: 2,
  divisionsAcross: 4,
  diagonals: 'staggered',
};

const nearest = (points: { x: number; y: number }[]): number =>
  Math.min(...points.flatMap((a, at) => points.slice(at + 1).map((b) => Math.hypot(a.x - b.x, a.y - b.y))));

const fromLine = (
  point: { x: number; y: number },
  { x1, y1, x2, y2 }: { x1: number; y1: number; x2: number; y2: number },
): number => {
  const along = ((point.x - x1) * (x2 - x1) + (point.y - y1) * (y2 - y1)) / ((x2 - x1) ** 2 + (y2 - y1) ** 2);
  const share = Math.min(1, Math.max(0, along));
  return Math.hypot(point.x - x1 - share * (x2 - x1), point.y - y1 - share * (y2 - y1));
};

/** A tetrahedron with a fifth joint on a strut of its own. */
const spread: Frame = {
  joints: [
    { x: 0, y: 0, z: 0 },
    { x: 300, y: 20, z: 0 },
    { x: 120, y: 330, z: 40 },
    { x: 90, y: 110, z: 280 },
    { x: 0, y: 0, z: -100 },
  ],
  struts: [
    [0, 1],
    [1, 2],
    [2, 0],
    [0, 3],
    [1, 3],
    [2, 3],
    [3, 4],
  ],
  faces: [],
};

/** A place that the usual turned view (28 degrees to the right, 22 up) shows at the same point of the page, 150 mm nearer. */
const awayFrom = (x: number, y: number, z: number) => {
  const [right, up] = [(28 * Math.PI) / 180, (22 * Math.PI) / 180];
  return {
    x: x + 150 * Math.sin(right) * Math.cos(up),
    y: y - 150 * Math.cos(right) * Math.cos(up),
    z: z + 150 * Math.sin(up),
  };
};

describe('flatDrawing', () => {
  it('front view > prism 200 wide and 500 high > true to scale, dimensions 200 and 500 mm', () => {
    const drawing = flatDrawing(box, { ...page, view: 'front' });
    expect(drawing.dimensions.map(({ kind, mm }) => [kind, Math.round(mm * 1e6) / 1e6])).toEqual([
      ['width', 200],
      ['height', 500],
    ]);
    const [width, height] = drawing.dimensions;
    expect(width!.line.x2 - width!.line.x1).toBeCloseTo(200 * drawing.pxPerMm, 6);
    expect(height!.line.y1 - height!.line.y2).toBeCloseTo(500 * drawing.pxPerMm, 6);
    expect(height!.label.angle).toBeCloseTo(-90, 9);
    expect(width!.label.angle).toBeCloseTo(0, 9);
  });

  it('front, side and top > one frame > right is x, y, x and up is z, z, y', () => {
    const corner: Frame = {
      joints: [
        { x: 0, y: 0, z: 0 },
        { x: 100, y: 200, z: 300 },
      ],
      struts: [[0, 1]],
      faces: [],
    };
    const spans = (['front', 'side', 'top'] as const).map((view) => {
      const { points, pxPerMm } = flatDrawing(corner, { ...page, view });
      return [points[1]!.x - points[0]!.x, points[0]!.y - points[1]!.y].map((px) => Math.round(px / pxPerMm));
    });
    expect(spans).toEqual([
      [100, 300],
      [200, 300],
      [100, 200],
    ]);
  });

  it('isometric > cube > all twelve struts of one length on the page, three dimensions of 300 mm', () => {
    const drawing = flatDrawing(cube, { ...page, view: 'isometric' });
    const lengths = drawing.lines.map(({ x1, y1, x2, y2 }) => Math.hypot(x2 - x1, y2 - y1));
    for (const length of lengths) expect(length).toBeCloseTo(lengths[0]!, 6);
    expect(drawing.dimensions.map(({ kind }) => kind)).toEqual(['width', 'depth', 'height']);
    for (const { mm } of drawing.dimensions) expect(mm).toBeCloseTo(300, 9);
  });

  it('auto > cube, whose isometric view hides a joint > turned view in which all eight stand apart', () => {
    expect(nearest(flatDrawing(cube, { ...page, view: 'isometric' }).points)).toBeLessThan(0.001);
    const drawing = flatDrawing(cube, page);
    expect(drawing.view).toBe('turned');
    expect(nearest(drawing.points)).toBeGreaterThan(10);
  });

  for (const shape of [
    { kind: 'tetrahedron', edgeMm: 200 },
    { kind: 'octahedron', edgeMm: 200 },
    { kind: 'dodecahedron', edgeMm: 200 },
    { kind: 'icosahedron', edgeMm: 200 },
    { kind: 'bipyramid', sides: 6, baseBy: 'radius', baseMm: 100, upperMm: 250, lowerMm: 150 },
    bay,
  ] satisfies Shape[])
    it(`auto > ${shape.kind} > no two joints on one another, every joint number clear and on the page`, () => {
      const drawing = flatDrawing(buildShape(shape), page);
      expect(nearest(drawing.points)).toBeGreaterThan(5);
      expect(drawing.points.every(({ clear }) => clear)).toBe(true);
      for (const { label } of [...drawing.points, ...drawing.lines]) {
        expect(label.x).toBeGreaterThan(0);
        expect(label.x).toBeLessThan(page.width);
        expect(label.y).toBeGreaterThan(0);
        expect(label.y).toBeLessThan(page.height);
      }
    });

  it('auto > joints one behind the other in the usual view > another view is taken, in which they stand apart', () => {
    const behind = awayFrom(0, 0, 0);
    const frame: Frame = { ...spread, joints: [...spread.joints.slice(0, 4), behind] };
    expect(nearest(flatDrawing(frame, page).points)).toBeGreaterThan(5);
  });

  it('auto > joint in front of a strut that is not its own in the usual view > another view is taken', () => {
    const [a, b] = [spread.joints[1]!, spread.joints[2]!];
    const infront = awayFrom((a.x + b.x) / 2, (a.y + b.y) / 2, (a.z + b.z) / 2);
    const { points, lines } = flatDrawing(
      { ...spread, joints: [...spread.joints.slice(0, 4), infront] },
      page,
    );
    const line = lines.find(({ from, to }) => from === 2 && to === 3)!;
    expect(fromLine(points[4]!, line)).toBeGreaterThan(4);
  });

  it('numbers of joints > dodecahedron > none over a strut', () => {
    const { points, lines } = flatDrawing(buildShape({ kind: 'dodecahedron', edgeMm: 200 }), page);
    for (const { label } of points)
      for (const line of lines) expect(fromLine(label, line)).toBeGreaterThan(5.9);
  });

  it('dimensions > every view of the bay > on the page, running right or up', () => {
    for (const view of ['auto', 'isometric', 'front', 'side', 'top'] as const)
      for (const { line, label } of flatDrawing(buildShape(bay), { ...page, view }).dimensions) {
        for (const x of [line.x1, line.x2]) expect(Math.abs(x - page.width / 2)).toBeLessThan(page.width / 2);
        for (const y of [line.y1, line.y2])
          expect(Math.abs(y - page.height / 2)).toBeLessThan(page.height / 2);
        expect(Math.abs(label.angle)).toBeLessThan(90.001);
      }
  });

  it('dimensions > ring as wide as the page > along its box, which reaches past the joints, yet on the page', () => {
    const ring = buildShape({ kind: 'antiprism', sides: 8, baseBy: 'edge', baseMm: 200, uniform: true });
    const { dimensions } = flatDrawing(ring, { width: 300, height: 600, view: 'isometric' });
    for (const { line } of dimensions)
      for (const x of [line.x1, line.x2]) expect(Math.abs(x - 150)).toBeLessThan(130);
  });

  it('auto > planar frame standing askew > looks square onto it, lengths true', () => {
    const flat = buildShape({ ...bay, riseMm: 0 });
    const [turn, tilt] = [0.7, 1.1];
    const askew: Frame = {
      ...flat,
      joints: flat.joints.map(({ x, y }) => ({
        x: x * Math.cos(turn) - y * Math.cos(tilt) * Math.sin(turn),
        y: x * Math.sin(turn) + y * Math.cos(tilt) * Math.cos(turn),
        z: y * Math.sin(tilt),
      })),
    };
    for (const frame of [flat, askew]) {
      const drawing = flatDrawing(frame, page);
      expect(drawing.view).toBe('plane');
      for (const { x1, y1, x2, y2, lengthMm } of drawing.lines)
        expect(Math.hypot(x2 - x1, y2 - y1)).toBeCloseTo(lengthMm * drawing.pxPerMm, 6);
      expect(drawing.dimensions.map(({ mm }) => Math.round(mm))).toEqual([2700, 1000]);
    }
  });

  it.each([[{ x: 0, y: 0, z: 100 }], [{ x: 100, y: 0, z: 0 }], [{ x: 30, y: -40, z: 120 }]])(
    'auto > a single strut to %j > drawn at its true length',
    (end) => {
      const drawing = flatDrawing({ joints: [{ x: 0, y: 0, z: 0 }, end], struts: [[0, 1]], faces: [] }, page);
      const { x1, y1, x2, y2, lengthMm } = drawing.lines[0]!;
      expect(Math.hypot(x2 - x1, y2 - y1)).toBeCloseTo(lengthMm * drawing.pxPerMm, 6);
      expect(drawing.dimensions.length).toBeGreaterThan(0);
    },
  );

  it('lines > cube > painted from far to near, numbers from 1, ends at the joints', () => {
    const { lines, points } = flatDrawing(cube, page);
    expect(lines.map(({ depth }) => depth)).toEqual(lines.map(({ depth }) => depth).sort((a, b) => a - b));
    expect(lines.map(({ strut }) => strut).sort((a, b) => a - b)).toEqual(cube.struts.map((_, at) => at + 1));
    for (const { from, to, x1, y1, x2, y2 } of lines) {
      expect(points[from - 1]).toMatchObject({ joint: from, x: x1, y: y1 });
      expect(points[to - 1]).toMatchObject({ joint: to, x: x2, y: y2 });
    }
  });

  it('same frame > drawn twice > the same drawing', () => {
    expect(flatDrawing(cube, page)).toEqual(flatDrawing(structuredClone(cube), page));
  });

  it('two joints on one another > front view of the cube > their numbers side by side', () => {
    const { points } = flatDrawing(cube, { ...page, view: 'front' });
    expect(nearest(points.map(({ label }) => label))).toBeGreaterThan(8);
  });

  it('page as small as a stamp > drawn > still inside it', () => {
    for (const { x, y } of flatDrawing(cube, { width: 40, height: 30 }).points) {
      expect(x).toBeGreaterThan(0);
      expect(x).toBeLessThan(40);
      expect(y).toBeGreaterThan(0);
      expect(y).toBeLessThan(30);
    }
  });

  it('empty frame > drawn > an empty drawing and an empty path', () => {
    const empty: Frame = { joints: [], struts: [], faces: [] };
    expect(flatDrawing(empty, page)).toMatchObject({ points: [], lines: [], dimensions: [] });
    expect(wireframeThumbnail(empty, 62, 37)).toBe('');
  });
});

describe('wireframeThumbnail', () => {
  it('dodecahedron > 62 x 37 px > one path with every strut once, inside the page', () => {
    const frame = buildShape({ kind: 'dodecahedron', edgeMm: 200 });
    const path = wireframeThumbnail(frame, 62, 37);
    expect(path).toMatch(/^(M[\d.]+ [\d.]+(L[\d.]+ [\d.]+)+)+$/);
    expect(path.match(/L/g)).toHaveLength(30);
    const numbers = path.match(/[\d.]+/g)!.map(Number);
    numbers.forEach((value, at) => expect(value).toBeLessThanOrEqual(at % 2 === 0 ? 60 : 35));
    numbers.forEach((value) => expect(value).toBeGreaterThanOrEqual(2));
  });
});
