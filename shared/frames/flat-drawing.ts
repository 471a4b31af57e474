import { boxCorners, isOblique, overallDimensions } from './dimensions';
import type { Dimension } from './dimensions';
import { strutLengths } from './frame';
import type { Frame } from './frame';
import { PageContent } from './label-placing';
import type { Place, Segment } from './label-placing';
import { chooseCamera, project } from './projection';
import type { Camera, Projected, View, ViewTaken } from './projection';

/** A joint on a drawing. `joint` counts from 1; `label` is the middle of its number; `clear`: the number covers nothing. */
export type DrawnJoint = { joint: number; x: number; y: number; depth: number; label: Place; clear: boolean };

/** A strut on a drawing. `strut`, `from` and `to` count from 1; `depth` is that of its middle. */
export type DrawnStrut = Segment & {
  strut: number;
  from: number;
  to: number;
  lengthMm: number;
  depth: number;
  label: Place;
  clear: boolean;
};

/** A flat drawing as data: px with y downwards, as SVG has it. */
export type FlatDrawing = {
  view: ViewTaken;
  width: number;
  height: number;
  pxPerMm: number;
  points: DrawnJoint[];
  /** From the farthest to the nearest, so that painting them in order puts the near ones on top. */
  lines: DrawnStrut[];
  dimensions: Dimension[];
};

export type FlatDrawingOptions = {
  view?: View;
  width: number;
  height: number;
  margin?: number;
  labelPx?: number;
};

const JOINT_PX = 5;
/** Above this many joints nobody reads the numbers, and each is put at the most open side without a look at the rest. */
const MOST_PLACED = 600;

type Layout = { camera: Camera; points: Projected[]; pxPerMm: number; toPage: (p: Place) => Place };

/** Fits a frame into a page: scale, and from mm on the plane of projection to px. */
function layOut(
  frame: Frame,
  camera: Camera,
  width: number,
  height: number,
  margin: number,
  room: boolean,
): Layout {
  const points = frame.joints.map((joint) => project(joint, camera));
  const extent = room ? boxCorners(frame).map((corner) => project(corner, camera)) : points;
  const least = { x: Number.POSITIVE_INFINITY, y: Number.POSITIVE_INFINITY };
  const most = { x: Number.NEGATIVE_INFINITY, y: Number.NEGATIVE_INFINITY };
  for (const { x, y } of extent) {
    [least.x, most.x] = [Math.min(least.x, x), Math.max(most.x, x)];
    [least.y, most.y] = [Math.min(least.y, y), Math.max(most.y, y)];
  }
  const fit = Math.min(
    (width - 2 * margin) / Math.max(most.x - least.x, 1e-6),
    (height - 2 * margin) / Math.max(most.y - least.y, 1e-6),
  );
  const [midX, midY] = [(least.x + most.x) / 2, (least.y + most.y) / 2];
  return {
    camera,
    points,
    pxPerMm: fit,
    toPage: ({ x, y }) => ({ x: width / 2 + (x - midX) * fit, y: height / 2 - (y - midY) * fit }),
  };
}

/** The direction away from a joint's struts: the middle of the widest gap between them; outward when there is none. */
function openSide(at: Place, ends: readonly Place[], middle: Place): number {
  const outward = Math.atan2(at.y - middle.y, at.x - middle.x);
  const angles = ends
    .filter((end) => Math.hypot(end.x - at.x, end.y - at.y) > 0.5)
    .map((end) => Math.atan2(end.y - at.y, end.x - at.x))
    .sort((a, b) => a - b);
  if (angles.length === 0) return outward;
  let [best, widest] = [outward, -1];
  angles.forEach((angle, index) => {
    const next = angles[index + 1] ?? angles[0]! + 2 * Math.PI;
    const gap = next - angle;
    const middleOfGap = angle + gap / 2;
    // A gap that looks outward wins among equals: numbers belong outside the drawing.
    const score = gap + 0.1 * Math.cos(middleOfGap - outward);
    if (score > widest + 1e-9) [best, widest] = [middleOfGap, score];
  });
  return best;
}

/** Places round a joint from the most wanted: near first, then turning away from the open side. */
function placesRound(at: Place, side: number, text: string, fontPx: number): Place[] {
  const [halfW, halfH] = [(text.length * 0.625 * fontPx) / 2, 0.45 * fontPx];
  return [2, 7, 13].flatMap((gap) =>
    Array.from({ length: 16 }, (_, step) => {
      const turn = (Math.ceil(step / 2) * (step % 2 === 0 ? 1 : -1) * Math.PI) / 8;
      const [dx, dy] = [Math.cos(side + turn), Math.sin(side + turn)];
      const reach =
        JOINT_PX + gap + Math.min(halfW / Math.max(Math.abs(dx), 1e-6), halfH / Math.max(Math.abs(dy), 1e-6));
      return { x: at.x + dx * reach, y: at.y + dy * reach };
    }),
  );
}

/** Places beside a strut from the most wanted: near its middle, on either side. */
function placesBeside({ x1, y1, x2, y2 }: Segment, text: string, fontPx: number): Place[] {
  const length = Math.max(Math.hypot(x2 - x1, y2 - y1), 1e-6);
  const [nx, ny] = [-(y2 - y1) / length, (x2 - x1) / length];
  const reach = 2 + Math.abs(nx) * ((text.length * 0.625 * fontPx) / 2) + Math.abs(ny) * 0.45 * fontPx;
  return [0.5, 0.42, 0.58, 0.34, 0.66, 0.26, 0.74].flatMap((share) =>
    [1, -1].map((side) => ({
      x: x1 + (x2 - x1) * share + nx * reach * side,
      y: y1 + (y2 - y1) * share + ny * reach * side,
    })),
  );
}

/**
 * A flat drawing of a frame with joint and strut numbers and overall dimensions, as data for SVG or print.
 * @param frame a valid frame, mm, z upwards
 * @param options `width`, `height` of the page in px, above 0; `view` (auto when left out): front looks along +y, side along -x, top
 *   down, isometric from 45 degrees, auto square onto a planar frame and else from where joints stand apart; `margin` px round the
 *   frame, where numbers and dimension lines go (56, less on a small page); `labelPx` size of the numbers (13.3)
 * @returns points in the order of the joints, lines from far to near, dimensions in real mm (width and height; in oblique views also
 *   depth, along the edges of the box round the frame). The same input always gives the same drawing.
 * Throws nothing; a frame without joints gives an empty drawing.
 */
export function flatDrawing(frame: Frame, options: FlatDrawingOptions): FlatDrawing {
  const { width, height, view = 'auto', labelPx = 13.3 } = options;
  const margin = Math.min(options.margin ?? 56, width / 4, height / 4);
  const camera = chooseCamera(frame, view);
  if (frame.joints.length === 0)
    return { view: camera.view, width, height, pxPerMm: 0, points: [], lines: [], dimensions: [] };
  const { points, toPage, pxPerMm } = layOut(frame, camera, width, height, margin, isOblique(camera));
  const places = points.map(toPage);
  const dimensions = overallDimensions(frame, camera, toPage, margin * 0.6);

  const lengths = strutLengths(frame);
  const bare = frame.struts.map(([a, b], index) => ({
    strut: index + 1,
    from: a + 1,
    to: b + 1,
    x1: places[a]!.x,
    y1: places[a]!.y,
    x2: places[b]!.x,
    y2: places[b]!.y,
    lengthMm: lengths[index]!,
    depth: (points[a]!.depth + points[b]!.depth) / 2,
  }));

  const page = new PageContent({ left: 0, top: 0, right: width, bottom: height });
  const placed = frame.joints.length <= MOST_PLACED;
  if (placed) {
    for (const line of bare) page.addLine(line);
    for (const { line, extensions } of dimensions)
      for (const part of [line, ...extensions]) page.addLine(part);
    for (const { x, y } of places)
      page.addBox({ left: x - JOINT_PX, top: y - JOINT_PX, right: x + JOINT_PX, bottom: y + JOINT_PX });
  }
  const put = (text: string, candidates: Place[]): { label: Place; clear: boolean } => {
    if (!placed) return { label: candidates[0]!, clear: false };
    const { x, y, clear } = page.place(text, labelPx, candidates);
    return { label: { x, y }, clear };
  };

  const ends: Place[][] = places.map(() => []);
  for (const [a, b] of frame.struts) {
    ends[a]!.push(places[b]!);
    ends[b]!.push(places[a]!);
  }
  const middle = { x: width / 2, y: height / 2 };
  const drawnPoints = places.map((at, index): DrawnJoint => {
    const text = String(index + 1);
    const side = openSide(at, ends[index]!, middle);
    return {
      joint: index + 1,
      x: at.x,
      y: at.y,
      depth: points[index]!.depth,
      ...put(text, placesRound(at, side, text, labelPx)),
    };
  });
  const lines = bare.map((line): DrawnStrut => {
    const text = String(line.strut);
    return { ...line, ...put(text, placesBeside(line, text, labelPx)) };
  });
  lines.sort((a, b) => a.depth - b.depth || a.strut - b.strut);
  return { view: camera.view, width, height, pxPerMm, points: drawnPoints, lines, dimensions };
}

const short = (value: number): string => String(Math.round(value * 10) / 10);

/**
 * A frame as a small sketch: the `d` of one SVG path.
 * @param frame a valid frame
 * @param width page width, px, above 4
 * @param height page height, px, above 4
 * @returns moves and lines with one decimal, every strut once, 2 px inside the page, in the view `auto`; empty without struts
 */
export function wireframeThumbnail(frame: Frame, width: number, height: number): string {
  if (frame.struts.length === 0) return '';
  const { points, toPage } = layOut(frame, chooseCamera(frame, 'auto'), width, height, 2, false);
  const places = points.map(toPage).map(({ x, y }) => `${short(x)} ${short(y)}`);
  const open: number[][] = places.map(() => []);
  frame.struts.forEach(([a, b], strut) => {
    open[a]!.push(strut);
    open[b]!.push(strut);
  });
  // Struts are strung into long strokes, since a board has hundreds of these.
  const drawn = new Set<number>();
  let path = '';
  frame.struts.forEach(([start], first) => {
    if (drawn.has(first)) return;
    let at = start;
    let strut: number | undefined = first;
    path += `M${places[at]}`;
    while (strut !== undefined) {
      drawn.add(strut);
      const [a, b]: [number, number] = frame.struts[strut]!;
      at = at === a ? b : a;
      path += `L${places[at]}`;
      strut = open[at]!.find((next) => !drawn.has(next));
    }
  });
  return path;
}
