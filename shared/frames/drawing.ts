import { edgeKey } from './edge-key';
import type { Frame, Joint, Strut } from './frame';
import { copyPlaces, placeFrame, type Place } from './placing';

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
};

/**
 * Puts placed frames together: joints closer than a tolerance become one, at the place of the first of them, so that nothing that was
 * there moves when more is placed.
 * @param placements in the order in which they count
 * @param frames by id, mm
 * @param withinMm tolerance in mm, 0 or more; joints are compared with the places that stand, not with each other in a chain
 * @returns joints and struts in the order of the placements; faces whose every edge is left
 * Source: own.
 */
export function joinDrawing(
  placements: readonly PlacedFrame[],
  frames: ReadonlyMap<string, Frame>,
  withinMm: number,
): JoinedDrawing {
  const joints = new JointTable(withinMm);
  const struts: Strut[] = [];
  const sources: StrutSource[] = [];
  const faces: number[][] = [];
  const known = new Map<ReturnType<typeof edgeKey>, number>();
  const drawing: JoinedDrawing = {
    frame: { joints: joints.places, struts, faces },
    sources,
    doubled: [],
    vanished: [],
    missing: [],
  };
  for (const placement of placements) {
    const frame = frames.get(placement.frameId);
    if (!frame) {
      drawing.missing.push(placement.id);
      continue;
    }
    copyPlaces(placement).forEach((place, copy) => {
      const placed = placeFrame(frame, place);
      const joint = placed.joints.map((at) => joints.indexOf(at));
      placed.struts.forEach(([a, b], strut) => {
        const source: StrutSource = [placement.id, copy, strut];
        const [from, to] = [joint[a]!, joint[b]!];
        if (from === to) {
          drawing.vanished.push(source);
          return;
        }
        const key = edgeKey(from, to);
        const there = known.get(key);
        if (there !== undefined) {
          drawing.doubled.push({ kept: sources[there]!, left: source });
          return;
        }
        known.set(key, struts.length);
        struts.push([from, to]);
        sources.push(source);
      });
      for (const face of placed.faces) {
        const ring = face.map((at) => joint[at]!);
        if (new Set(ring).size === ring.length) faces.push(ring);
      }
    });
  }
  return drawing;
}

/** Joints by place: a grid of cells as wide as the tolerance, so that only neighbours are compared. */
class JointTable {
  readonly places: Joint[] = [];
  private readonly cells = new Map<string, number[]>();
  private readonly cell: number;

  constructor(private readonly withinMm: number) {
    // Without a tolerance only the same place is the same joint.
    this.cell = Math.max(withinMm, 1e-6);
  }

  indexOf(at: Joint): number {
    const [x, y, z] = [at.x, at.y, at.z].map((value) => Math.floor(value / this.cell)) as [
      number,
      number,
      number,
    ];
    let nearest = -1;
    let least = this.withinMm;
    for (let dx = -1; dx <= 1; dx += 1) {
      for (let dy = -1; dy <= 1; dy += 1) {
        for (let dz = -1; dz <= 1; dz += 1) {
          for (const index of this.cells.get(`${x + dx},${y + dy},${z + dz}`) ?? []) {
            const other = this.places[index]!;
            const away = Math.hypot(at.x - other.x, at.y - other.y, at.z - other.z);
            if (away < least || (away === least && nearest < 0)) [nearest, least] = [index, away];
          }
        }
      }
    }
    if (nearest >= 0) return nearest;
    const index = this.places.length;
    this.places.push(at);
    const key = `${x},${y},${z}`;
    const cell = this.cells.get(key);
    if (cell) cell.push(index);
    else this.cells.set(key, [index]);
    return index;
  }
}
