import { edgeKey } from './edge-key';
import type { Frame, Joint } from './frame';
import { linkedWithin } from './near-points';
import { copyPlaces, placeFrame, type Place } from './placing';
import { distance } from './vector';

/** A frame that stands in the drawing, copies included. */
export type PlacedFrame = Place & { id: string; frameId: string };

/** What names a strut through changes of the drawing: the placement, the copy from 0, the frame's strut from 0. */
export type StrutSource = [placementId: string, copy: number, strut: number];

/** All frames of an installation as one. */
export type JoinedDrawing = {
  frame: Frame;
  /** For each strut where it comes from. */
  sources: StrutSource[];
  /** Struts that fell on another one and were left out. */
  doubled: { kept: StrutSource; left: StrutSource }[];
  /** Struts whose two ends became one joint. */
  vanished: StrutSource[];
  /** Placements whose frame is not there. */
  missing: string[];
  /** How far the farthest joint was drawn to the place of the joint it became, mm. */
  movedMm: number;
};

/** Places that differ by less come from rounding of turns and are one, even without a tolerance. */
const ROUNDING_MM = 1e-6;

/**
 * Puts placed frames together: joints closer than a tolerance become one, at the place of the first of them.
 * @param placements in the order in which they count
 * @param frames by id, mm
 * @param withinMm tolerance in mm, 0 or more. Joints are linked in a chain (single linkage), so which joints become one does not depend
 *   on the order of the placements. They stand where the first of them stood, not at their mean: what hangs on measured points stays
 *   where it was measured when more is placed beside it.
 * @returns joints and struts in the order of the placements; faces that still have three joints, each once; `movedMm` is how far the
 *   farthest joint was drawn to its place. Struts that lie on another one or have no length left are named, not lost.
 * Source: own; single-linkage clustering over a grid of cells.
 */
export function joinDrawing(
  placements: readonly PlacedFrame[],
  frames: ReadonlyMap<string, Frame>,
  withinMm: number,
): JoinedDrawing {
  const missing: string[] = [];
  const placed = placements.flatMap((placement) => {
    const frame = frames.get(placement.frameId);
    if (!frame) {
      missing.push(placement.id);
      return [];
    }
    return copyPlaces(placement).map((place, copy) => ({
      id: placement.id,
      copy,
      frame: placeFrame(frame, place),
    }));
  });
  const all = placed.flatMap(({ frame }) => frame.joints);
  const first = linkedWithin(all, Math.max(withinMm, ROUNDING_MM));
  const joints: Joint[] = [];
  const number = new Map<number, number>();
  let movedMm = 0;
  first.forEach((leader, at) => {
    if (leader === at) {
      number.set(at, joints.length);
      joints.push(all[at]!);
    } else movedMm = Math.max(movedMm, distance(all[leader]!, all[at]!));
  });
  const drawing: JoinedDrawing = {
    frame: { joints, struts: [], faces: [] },
    sources: [],
    doubled: [],
    vanished: [],
    missing,
    movedMm,
  };
  const known: Known = { struts: new Map(), faces: new Set() };
  let start = 0;
  for (const { id, copy, frame } of placed) {
    const from = start;
    addPlaced(drawing, known, { id, copy, frame, joint: (at) => number.get(first[from + at]!)! });
    start += frame.joints.length;
  }
  return drawing;
}

type Known = { struts: Map<ReturnType<typeof edgeKey>, number>; faces: Set<string> };
type Placed = { id: string; copy: number; frame: Frame; joint: (at: number) => number };

function addPlaced(drawing: JoinedDrawing, known: Known, { id, copy, frame, joint }: Placed): void {
  const { struts, faces } = drawing.frame;
  frame.struts.forEach(([a, b], strut) => {
    const source: StrutSource = [id, copy, strut];
    const [from, to] = [joint(a), joint(b)];
    const key = edgeKey(from, to);
    const there = known.struts.get(key);
    if (from === to) drawing.vanished.push(source);
    else if (there !== undefined) drawing.doubled.push({ kept: drawing.sources[there]!, left: source });
    else {
      known.struts.set(key, struts.length);
      struts.push([from, to]);
      drawing.sources.push(source);
    }
  });
  for (const face of frame.faces) {
    const joined = face.map(joint);
    // An edge that vanished leaves the same joint twice in a row; the face has a corner less.
    const ring = joined.filter((at, place) => at !== joined[(place + 1) % joined.length]);
    const name = [...ring].sort((a, b) => a - b).join(' ');
    if (ring.length < 3 || new Set(ring).size !== ring.length || known.faces.has(name)) continue;
    known.faces.add(name);
    faces.push(ring);
  }
}
