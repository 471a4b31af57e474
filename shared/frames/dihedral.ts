import { edgeKey, ringEdges } from './edge-key';
import type { Frame } from './frame';
import { add, cross, dot, subtract, unit } from './vector';
import type { Vector } from './vector';

/** The angle between two faces along the strut they share. `strut` and `faces` are indexes from 0. */
export type Dihedral = { strut: number; faces: [number, number]; degrees: number };

type Use = { face: number; from: number; to: number };

/** Newell's normal: the area vector of the ring, which also serves rings that are not quite planar. */
function ringNormal(points: Vector[]): Vector {
  let sum: Vector = { x: 0, y: 0, z: 0 };
  points.forEach((p, at) => {
    sum = add(sum, cross(p, points[(at + 1) % points.length]!));
  });
  return unit(sum);
}

/** Six times the volume under a ring, as a fan of tetrahedra from the origin. */
function fanVolume(points: Vector[]): number {
  let sum = 0;
  for (let at = 1; at + 1 < points.length; at++) sum += dot(points[0]!, cross(points[at]!, points[at + 1]!));
  return sum;
}

/**
 * Decides for each face whether its ring must be read backwards, so that neighbours agree and closed shells look outward.
 * @returns per face: reversed or not, and whether its shell is closed
 */
function orientFaces(frame: Frame, uses: Map<number, Use[]>): { reversed: boolean; closed: boolean }[] {
  const state: ({ reversed: boolean; closed: boolean } | undefined)[] = frame.faces.map(() => undefined);
  frame.faces.forEach((_, start) => {
    if (state[start]) return;
    state[start] = { reversed: false, closed: true };
    const shell = [start];
    let closed = true;
    for (let at = 0; at < shell.length; at++) {
      const face = shell[at]!;
      for (const [a, b] of ringEdges(frame.faces[face]!)) {
        const pair = uses.get(edgeKey(a, b)) ?? [];
        if (pair.length !== 2) {
          closed = false;
          continue;
        }
        const [own, other] = pair[0]!.face === face ? [pair[0]!, pair[1]!] : [pair[1]!, pair[0]!];
        if (state[other.face]) continue;
        const sameWay = own.from === other.from;
        state[other.face] = { reversed: state[face]!.reversed !== sameWay, closed: true };
        shell.push(other.face);
      }
    }
    let volume = 0;
    for (const face of shell) {
      const points = frame.faces[face]!.map((joint) => frame.joints[joint]!);
      volume += state[face]!.reversed ? -fanVolume(points) : fanVolume(points);
    }
    for (const face of shell) {
      const found = state[face]!;
      state[face] = { reversed: closed && volume < 0 ? !found.reversed : found.reversed, closed };
    }
  });
  return state.map((found) => found!);
}

/**
 * The dihedral angle at every strut that exactly two faces share.
 * @param frame a valid frame; faces may be wound either way
 * @returns in the order of the struts; degrees inside the shape (above 180 where it is dented) when the faces close it, else the
 *   smaller of the two angles between them (at most 180). Faces that are not planar count with Newell's mean normal.
 * Source: angle between outward normals, own.
 */
export function dihedralAngles(frame: Frame): Dihedral[] {
  const uses = new Map<number, Use[]>();
  frame.faces.forEach((ring, face) => {
    for (const [from, to] of ringEdges(ring)) {
      const key = edgeKey(from, to);
      const list = uses.get(key);
      if (list) list.push({ face, from, to });
      else uses.set(key, [{ face, from, to }]);
    }
  });
  const orientation = orientFaces(frame, uses);
  const normals = frame.faces.map((ring, face) => {
    const points = ring.map((joint) => frame.joints[joint]!);
    return ringNormal(orientation[face]!.reversed ? points.reverse() : points);
  });
  const angles: Dihedral[] = [];
  frame.struts.forEach(([a, b], strut) => {
    const pair = uses.get(edgeKey(a, b)) ?? [];
    if (pair.length !== 2) return;
    const [one, two] = [pair[0]!, pair[1]!];
    const [from, to] = orientation[one.face]!.reversed ? [one.to, one.from] : [one.from, one.to];
    const along = unit(subtract(frame.joints[to]!, frame.joints[from]!));
    const [n1, n2] = [normals[one.face]!, normals[two.face]!];
    const turn = Math.atan2(dot(cross(n1, n2), along), dot(n1, n2));
    const inside = 180 - (turn * 180) / Math.PI;
    angles.push({
      strut,
      faces: [one.face, two.face],
      degrees: orientation[one.face]!.closed ? inside : Math.min(inside, 360 - inside),
    });
  });
  return angles;
}
