import type { Frame } from '../../frames/frame';
import { cross, distance, dot, size, subtract, unit } from '../../frames/vector';
import type { Vector } from '../../frames/vector';
import type { Hold, NextMove } from './moves';
import { above, ringPlane } from './ring-plane';
import type { Ring } from './ring-plane';

/** What fixes a body in space: three coordinates and three turns; a joint: three coordinates. */
const BODY = 6;
const POINT = 3;
/** Ways of a flat that are fixed where it shares no joint, one, or two with what is there. */
const FIXED_BY_SHARED = [0, 3, 5] as const;
/** Struts that two hands and a helper bring together at one joint. */
const AT_ONCE = 3;
/** Planes whose normals agree this far are parallel (within about 1 degree). */
const PARALLEL = 0.9998;
/** Joints that stand off a line by less than this share of its length are on it: they make a hinge, however many they are. */
const ON_LINE = 0.02;

/** How many ways of a flat are fixed by the joints it shares with what is there. */
function fixedBy(points: readonly Vector[]): number {
  const [a, b] = points;
  if (!a || !b || points.length < 3) return FIXED_BY_SHARED[points.length]!;
  const along = unit(subtract(b, a));
  const off = points.some((p) => size(cross(along, subtract(p, a))) > ON_LINE * distance(a, b));
  return off ? BODY : FIXED_BY_SHARED[2];
}

/** A thing that could be done next; the one that leaves least loose is done. */
type Choice = {
  /** Ways in which it could still move when its struts are in. */
  loose: number;
  triangles: number;
  /** Flats before single joints where all else is equal. */
  rank: number;
  index: number;
  take: () => NextMove;
};

const isBefore = (a: Choice, b: Choice): boolean =>
  a.loose !== b.loose
    ? a.loose < b.loose
    : a.triangles !== b.triangles
      ? a.triangles > b.triangles
      : a.rank !== b.rank
        ? a.rank < b.rank
        : a.index < b.index;

const best = (choices: readonly Choice[]): Choice | undefined =>
  choices.reduce<Choice | undefined>(
    (found, next) => (!found || isBefore(next, found) ? next : found),
    undefined,
  );

/**
 * The order in which flats and struts are put together once the flats are made.
 * @param frame a valid frame, mm
 * @param flats rings without a common strut; the first stays lying and the rest is built on it
 * @param laid struts that are already in flats or across them
 * @returns moves of the kinds begin, join, raise and strut. A strut between joints that are there goes in at once, the one that closes
 *   most triangles first; otherwise what will be held most firmly: flats by shared joints and struts between, new joints by their struts.
 * Source: own.
 */
export function orderRaised(frame: Frame, flats: readonly Ring[], laid: ReadonlySet<number>): NextMove[] {
  const { joints, struts } = frame;
  const strutsAt: { strut: number; other: number }[][] = joints.map(() => []);
  struts.forEach(([a, b], strut) => {
    strutsAt[a]!.push({ strut, other: b });
    strutsAt[b]!.push({ strut, other: a });
  });
  const flatsAt: number[][] = joints.map(() => []);
  flats.forEach((ring, flat) => ring.joints.forEach((joint) => flatsAt[joint]!.push(flat)));
  const planes = flats.map((ring) => ringPlane(ring.joints.map((joint) => joints[joint]!)));

  const open = new Set(struts.flatMap((_, strut) => (laid.has(strut) ? [] : [strut])));
  const unplaced = new Set(flats.keys());
  const built = new Set<number>();
  const linked = new Set<number>();
  const key = (a: number, b: number): number => Math.min(a, b) * joints.length + Math.max(a, b);
  const moves: NextMove[] = [];

  const fasten = (strut: number): void => {
    open.delete(strut);
    linked.add(key(...struts[strut]!));
    for (const joint of struts[strut]!) built.add(joint);
  };
  const place = (flat: number): void => {
    unplaced.delete(flat);
    for (const joint of flats[flat]!.joints) built.add(joint);
    for (const strut of flats[flat]!.struts) linked.add(key(...struts[strut]!));
    for (const strut of laid) {
      const [a, b] = struts[strut]!;
      if (built.has(a) && built.has(b)) linked.add(key(a, b));
    }
  };
  const trianglesOver = (a: number, b: number): number =>
    strutsAt[a]!.filter(({ other }) => linked.has(key(a, other)) && linked.has(key(b, other))).length;
  /** Struts from a joint that is not there yet to joints that are. */
  const tiesOf = (joint: number) =>
    strutsAt[joint]!.filter(({ strut, other }) => open.has(strut) && built.has(other));

  let held: {
    flat: number;
    joints: ReadonlySet<number>;
    fixed: number;
    glued: number[];
    over: Hold['over'];
  } | null = null;

  /** A flat is parallel to another that is there: then its distance helps to hold it. */
  const overOf = (flat: number, joint: number): Hold['over'] => {
    const below = flatsAt[joint]!.find(
      (other) =>
        !unplaced.has(other) && Math.abs(dot(planes[other]!.normal, planes[flat]!.normal)) > PARALLEL,
    );
    if (below === undefined) return null;
    return { flat: below, mm: Math.abs(above(planes[below]!, planes[flat]!.point)) };
  };

  const closing = (): Choice | undefined => {
    const own = held;
    const between = [...open].filter((strut) => struts[strut]!.every((joint) => built.has(joint)));
    const ofHeld = own
      ? between.filter((strut) => struts[strut]!.some((joint) => own.joints.has(joint)))
      : [];
    if (own && ofHeld.length > 0) {
      // Spread like the legs of a stool: far from those already glued.
      const reach = (strut: number): number =>
        Math.min(
          ...own.glued.map((joint) =>
            Math.max(...struts[strut]!.map((end) => distance(joints[end]!, joints[joint]!))),
          ),
        );
      const spread = ofHeld
        .map((strut) => ({ strut, far: own.glued.length === 0 ? 0 : Math.round(reach(strut) * 10) }))
        .sort((a, b) => b.far - a.far || a.strut - b.strut)[0]!;
      return {
        loose: -1,
        triangles: 0,
        rank: 0,
        index: spread.strut,
        take: () => {
          own.fixed += 1;
          own.glued.push(...struts[spread.strut]!.filter((joint) => own.joints.has(joint)));
          const hold: Hold = { flat: own.flat, first: false, over: own.over };
          if (own.fixed >= BODY) held = null;
          fasten(spread.strut);
          return { kind: 'strut', struts: [spread.strut], joints: [...struts[spread.strut]!], hold };
        },
      };
    }
    held = null;
    return best(
      between.map((strut) => ({
        loose: 0,
        triangles: trianglesOver(...struts[strut]!),
        rank: 0,
        index: strut,
        take: () => {
          fasten(strut);
          return { kind: 'strut', struts: [strut], joints: [...struts[strut]!], hold: null };
        },
      })),
    );
  };

  const joining = (flat: number): Choice | undefined => {
    const ring = flats[flat]!;
    const shared = ring.joints.filter((joint) => built.has(joint));
    const ties = ring.joints
      .filter((joint) => !built.has(joint))
      .flatMap((joint) => tiesOf(joint).map((tie) => ({ joint, ...tie })));
    if (shared.length === 0 && ties.length === 0) return undefined;
    const fixed = fixedBy(shared.map((joint) => joints[joint]!));
    return {
      loose: BODY - Math.min(BODY, fixed + ties.length),
      triangles: 0,
      rank: 0,
      index: flat,
      take: () => {
        const first = shared.length === 0 ? ties.reduce((a, b) => (b.strut < a.strut ? b : a)) : null;
        const over = first ? overOf(flat, first.other) : null;
        place(flat);
        held = {
          flat,
          joints: new Set(ring.joints.filter((joint) => !shared.includes(joint))),
          fixed,
          glued: [],
          over,
        };
        if (!first) {
          if (fixed >= BODY) held = null;
          return { kind: 'join', flat, struts: [], joints: shared };
        }
        held.fixed += 1;
        held.glued.push(first.joint);
        fasten(first.strut);
        return {
          kind: 'strut',
          struts: [first.strut],
          joints: [first.other, first.joint],
          hold: { flat, first: true, over },
        };
      },
    };
  };

  const raising = (joint: number): Choice | undefined => {
    const ties = tiesOf(joint);
    if (ties.length === 0) return undefined;
    const pairs = ties.flatMap((a, at) =>
      ties.slice(at + 1).filter((b) => linked.has(key(a.other, b.other))),
    ).length;
    return {
      loose: POINT - Math.min(POINT, ties.length),
      triangles: pairs,
      rank: 1,
      index: joint,
      take: () => {
        const now = [...ties].sort((a, b) => a.strut - b.strut).slice(0, AT_ONCE);
        for (const { strut } of now) fasten(strut);
        return {
          kind: 'raise',
          struts: now.map(({ strut }) => strut),
          joints: [...now.map(({ other }) => other), joint],
          joint,
          prop: ties.length < 2,
        };
      },
    };
  };

  /** Nothing can be built on: the first flat, or the first strut, of this part lies on the bench. */
  const beginning = (): NextMove | null => {
    const [flat] = unplaced;
    if (flat !== undefined) {
      const first = moves.length === 0 && built.size === 0;
      place(flat);
      return first ? null : { kind: 'join', flat, struts: [], joints: [] };
    }
    const start = [...open].sort((a, b) => {
      const low = (strut: number) => Math.min(...struts[strut]!.map((joint) => joints[joint]!.z));
      const most = (strut: number) => struts[strut]!.reduce((sum, joint) => sum + strutsAt[joint]!.length, 0);
      return low(a) - low(b) || most(b) - most(a) || a - b;
    })[0]!;
    fasten(start);
    return { kind: 'begin', struts: [start], joints: [...struts[start]!] };
  };

  while (open.size + unplaced.size > 0) {
    const next =
      closing() ??
      best([
        ...[...unplaced].flatMap((flat) => joining(flat) ?? []),
        ...joints.flatMap((_, joint) =>
          built.has(joint) || flatsAt[joint]!.some((flat) => unplaced.has(flat))
            ? []
            : (raising(joint) ?? []),
        ),
      ]);
    const move = next ? next.take() : beginning();
    if (move) moves.push(move);
  }
  return moves;
}
