import type { Frame } from '../../frames/frame';
import { cross, distance, size, subtract, unit } from '../../frames/vector';
import type { Vector } from '../../frames/vector';
import { strutsThrough } from './ring-plane';
import type { Ring } from './ring-plane';

/** A strut from a joint that is not there yet (`joint`) to one that is (`to`). */
export type Tie = { strut: number; joint: number; to: number };

/** What fixes a body in space: three coordinates and three turns. */
export const BODY = 6;
/** Ways of a flat that are fixed where it shares no joint, one, or two with what is there. */
const FIXED_BY_SHARED = [0, 3, 5] as const;
/** Joints that stand off a line by less than this share of its length are on it: they make a hinge, however many they are. */
const ON_LINE = 0.02;

/** How many ways of a flat are fixed by the joints it shares with what is there. */
export function fixedBy(points: readonly Vector[]): number {
  const [a, b] = points;
  if (!a || !b || points.length < 3) return FIXED_BY_SHARED[points.length]!;
  const along = unit(subtract(b, a));
  const off = points.some((p) => size(cross(along, subtract(p, a))) > ON_LINE * distance(a, b));
  return off ? BODY : FIXED_BY_SHARED[2];
}

/** What of a piece is put together already, and what could be put to it. */
export type BuildState = {
  /** Struts that are to be glued one by one and are not yet. */
  readonly open: ReadonlySet<number>;
  readonly unplaced: ReadonlySet<number>;
  isThere(joint: number): boolean;
  /** Glues a strut; its joints are there from now on. */
  fasten(strut: number): void;
  /** Puts a flat in its place; its joints are there from now on. */
  place(flat: number): void;
  /** Open struts between two joints that are there. */
  between(): number[];
  tiesOf(joint: number): Tie[];
  /** Joints that are tied to both ends: so many triangles a strut between them closes. */
  trianglesOver(a: number, b: number): number;
  isTied(a: number, b: number): boolean;
  flatsAt(joint: number): readonly number[];
  /** Whether struts would go through a flat that is still to come, which then could not be brought in. */
  blocks(struts: readonly number[], exceptFlat?: number): boolean;
};

/**
 * The state of a piece before anything is put together.
 * @param frame a valid frame
 * @param flats rings without a common strut
 * @param laid struts that are in flats or across them
 */
export function buildState(frame: Frame, flats: readonly Ring[], laid: ReadonlySet<number>): BuildState {
  const { joints, struts } = frame;
  const strutsAt: { strut: number; other: number }[][] = joints.map(() => []);
  struts.forEach(([a, b], strut) => {
    strutsAt[a]!.push({ strut, other: b });
    strutsAt[b]!.push({ strut, other: a });
  });
  const flatsAt: number[][] = joints.map(() => []);
  flats.forEach((ring, flat) => ring.joints.forEach((joint) => flatsAt[joint]!.push(flat)));
  const through: number[][] = struts.map(() => []);
  flats.forEach((ring, flat) => strutsThrough(ring, frame).forEach((strut) => through[strut]!.push(flat)));

  const open = new Set(struts.flatMap((_, strut) => (laid.has(strut) ? [] : [strut])));
  const unplaced = new Set(flats.keys());
  const there = new Set<number>();
  const tied = new Set<number>();
  const key = (a: number, b: number): number => Math.min(a, b) * joints.length + Math.max(a, b);
  return {
    open,
    unplaced,
    isThere: (joint) => there.has(joint),
    fasten(strut) {
      open.delete(strut);
      tied.add(key(...struts[strut]!));
      for (const joint of struts[strut]!) there.add(joint);
    },
    place(flat) {
      unplaced.delete(flat);
      const ring = flats[flat]!;
      for (const joint of ring.joints) there.add(joint);
      for (const joint of ring.joints)
        for (const { strut, other } of strutsAt[joint]!)
          if (laid.has(strut) && ring.joints.includes(other)) tied.add(key(joint, other));
    },
    between: () => [...open].filter((strut) => struts[strut]!.every((joint) => there.has(joint))),
    tiesOf: (joint) =>
      strutsAt[joint]!.flatMap(({ strut, other }) =>
        open.has(strut) && there.has(other) ? [{ strut, joint, to: other }] : [],
      ),
    trianglesOver: (a, b) =>
      strutsAt[a]!.filter(({ other }) => tied.has(key(a, other)) && tied.has(key(b, other))).length,
    isTied: (a, b) => tied.has(key(a, b)),
    flatsAt: (joint) => flatsAt[joint]!,
    blocks: (candidates, exceptFlat) =>
      candidates.some((strut) => through[strut]!.some((flat) => flat !== exceptFlat && unplaced.has(flat))),
  };
}
