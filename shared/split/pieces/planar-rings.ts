import { edgeKey, ringEdges } from '../../frames/edge-key';
import type { Frame } from '../../frames/frame';
import { cross, size, subtract, unit } from '../../frames/vector';
import type { Vector } from '../../frames/vector';
import { planeCycles } from './plane-cycles';
import type { PlaneGraph } from './plane-cycles';
import { above, isSimple, ringPlane } from './ring-plane';
import type { Ring } from './ring-plane';

/** What counts as a flat ring, and how far the search for them goes. Faces of the frame are always looked at. */
export const RING_LIMITS = {
  /** How far a joint may stand off the bench, mm. */
  withinMm: 0.5,
  ringsPerPlane: 400,
  stepsPerPlane: 60_000,
  rings: 4_000,
} as const;

/** Joints of struts that span a plane may be this many tolerances off it before the ring itself is looked at. */
const LOOSE = 4;
/** Two struts at less than this sine of an angle are one line and span no plane. */
const LEAST_SINE = 0.02;

type Ends = { joint: number; strut: number };

/** From the lowest joint towards the lower of its neighbours, so that a ring found twice looks the same. */
function inOrder({ joints, struts }: Ring): Ring {
  const count = joints.length;
  const start = joints.indexOf(Math.min(...joints));
  const at = (k: number) => (k + 2 * count) % count;
  const forward = joints[at(start + 1)]! < joints[at(start - 1)]!;
  const place = (k: number) => (forward ? at(start + k) : at(start - k));
  return {
    joints: joints.map((_, k) => joints[place(k)]!),
    struts: struts.map((_, k) => struts[forward ? place(k) : at(start - k - 1)]!),
  };
}

/** Struts whose two ends lie in a plane, as neighbours of each joint. */
function graphOf(frame: Frame, plane: { point: Vector; normal: Vector }, within: number): PlaneGraph {
  const graph: PlaneGraph = new Map();
  const low = frame.joints.map((joint) => Math.abs(above(plane, joint)) <= within);
  const add = (from: number, joint: number, strut: number): void => {
    const list = graph.get(from);
    if (list) list.push({ joint, strut });
    else graph.set(from, [{ joint, strut }]);
  };
  frame.struts.forEach(([a, b], strut) => {
    if (!low[a] || !low[b]) return;
    add(a, b, strut);
    add(b, a, strut);
  });
  return graph;
}

/**
 * Rings of struts that can be glued flat on the bench: closed, planar, not crossing themselves.
 * @param frame a valid frame, mm; its faces are looked at first, then every plane that two struts at a joint span
 * @param withinMm how far a joint may lie off the ring's plane, mm
 * @returns each ring once, faces first, then plane by plane, short rings before long ones; `complete` false when a plane had more
 *   rings than `RING_LIMITS` let through
 * Source: own.
 */
export function planarRings(
  frame: Frame,
  withinMm: number = RING_LIMITS.withinMm,
): { rings: Ring[]; complete: boolean } {
  const rings: Ring[] = [];
  const seen = new Set<string>();
  const keep = (found: Ring): void => {
    const key = [...found.struts].sort((a, b) => a - b).join();
    if (seen.has(key)) return;
    seen.add(key);
    const points = found.joints.map((joint) => frame.joints[joint]!);
    const plane = ringPlane(points);
    if (plane.offMm <= withinMm && plane.widthMm > 2 * withinMm && isSimple(plane, points))
      rings.push(inOrder(found));
  };

  const strutOf = new Map(frame.struts.map(([a, b], strut) => [edgeKey(a, b), strut]));
  for (const face of frame.faces) {
    const struts = ringEdges(face).map(([a, b]) => strutOf.get(edgeKey(a, b)));
    if (face.length > 2 && new Set(face).size === face.length && struts.every((strut) => strut !== undefined))
      keep({ joints: face, struts });
  }

  const around: Ends[][] = frame.joints.map(() => []);
  frame.struts.forEach(([a, b], strut) => {
    around[a]!.push({ joint: b, strut });
    around[b]!.push({ joint: a, strut });
  });
  const spanned = new Set<number>();
  let complete = true;
  around.forEach((list, joint) => {
    list.forEach((one, at) => {
      for (const two of list.slice(at + 1)) {
        if (spanned.has(edgeKey(one.strut, two.strut))) continue;
        const point = frame.joints[joint]!;
        const [a, b] = [one, two].map((end) => unit(subtract(frame.joints[end.joint]!, point))) as [
          Vector,
          Vector,
        ];
        const normal = cross(a, b);
        if (size(normal) < LEAST_SINE) continue;
        if (rings.length >= RING_LIMITS.rings) {
          complete = false;
          continue;
        }
        const plane = { point, normal: unit(normal) };
        const graph = graphOf(frame, plane, LOOSE * withinMm);
        // Pairs whose plane this surely is need not be looked at again.
        const exact = graphOf(frame, plane, withinMm / 100);
        for (const near of exact.values())
          near.forEach((p, k) => {
            for (const q of near.slice(k + 1)) spanned.add(edgeKey(p.strut, q.strut));
          });
        const found = planeCycles(graph, {
          mostRings: RING_LIMITS.ringsPerPlane,
          mostSteps: RING_LIMITS.stepsPerPlane,
        });
        complete &&= found.complete;
        found.cycles.forEach(keep);
      }
    });
  });
  return { rings, complete };
}
