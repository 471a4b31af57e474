import type { Frame } from '../../frames/frame';
import { distance, dot } from '../../frames/vector';
import { BODY, buildState, fixedBy } from './build-state';
import type { BuildState } from './build-state';
import type { Hold, NextMove } from './moves';
import { above, ringPlane } from './ring-plane';
import type { Ring, RingPlane } from './ring-plane';

/** What fixes a joint in space: three coordinates. */
const POINT = 3;
/** Struts that two hands and a helper bring together at one joint. */
const AT_ONCE = 3;
/** Planes whose normals agree this far are parallel (within about 1 degree). */
const PARALLEL = 0.9998;

/** Joints this near the plane of a flat on the bench lie on the bench too, mm: a third of the thinnest dowel. */
const BENCH_MM = 1;

/** Something that could be done next; what leaves least loose is done. */
type Choice = {
  /** Whether it keeps out a flat that is still to come. */
  blocks: boolean;
  /** Whether all of it lies on the bench, in the plane of the flat that was put there first: such things are done before any lifting. */
  lying: boolean;
  /** Ways in which it could still move when its struts are in. */
  loose: number;
  triangles: number;
  /** Flats before single joints where all else is equal. */
  rank: number;
  index: number;
  take: () => NextMove;
};

const isBefore = (a: Choice, b: Choice): boolean =>
  a.blocks !== b.blocks
    ? b.blocks
    : a.lying !== b.lying
      ? a.lying
      : a.loose !== b.loose
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

/** A flat that is being held: it is let go when as many ways are fixed as a body has. */
type Held = {
  flat: number;
  /** Joints of the flat that were not there before it. */
  joints: ReadonlySet<number>;
  fixed: number;
  /** Joints of the flat where struts were glued since. */
  glued: number[];
  over: Hold['over'];
};

type Site = {
  frame: Frame;
  flats: readonly Ring[];
  planes: readonly RingPlane[];
  state: BuildState;
  held: Held | null;
  /** Joints in the plane of the flat that lies on the bench. */
  onBench: ReadonlySet<number>;
};

const isLying = ({ onBench }: Site, joints: readonly number[]): boolean =>
  joints.every((joint) => onBench.has(joint));

/** A strut of the flat that is held, spread like the legs of a stool: far from those already glued. */
function steadying(
  { frame, state }: Site,
  held: Held,
  candidates: readonly number[],
  letGo: () => void,
): Choice {
  const { joints, struts } = frame;
  const reach = (strut: number): number =>
    Math.min(
      ...held.glued.map((joint) =>
        Math.max(...struts[strut]!.map((end) => distance(joints[end]!, joints[joint]!))),
      ),
    );
  const { strut } = candidates
    .map((one) => ({ strut: one, far: held.glued.length === 0 ? 0 : Math.round(reach(one) * 10) }))
    .sort((a, b) => b.far - a.far || a.strut - b.strut)[0]!;
  return {
    blocks: false,
    lying: false,
    loose: -1,
    triangles: 0,
    rank: 0,
    index: strut,
    take: () => {
      held.fixed += 1;
      held.glued.push(...struts[strut]!.filter((joint) => held.joints.has(joint)));
      if (held.fixed >= BODY) letGo();
      state.fasten(strut);
      const hold: Hold = { flat: held.flat, first: false, over: held.over };
      const [a, b] = struts[strut]!;
      return {
        kind: 'strut',
        struts: [strut],
        joints: held.joints.has(a) ? [b, a] : [a, b],
        hold,
        lying: false,
      };
    },
  };
}

/** The best strut between joints that are there; first those of a flat that hands hold. */
function closing(site: Site): Choice | undefined {
  const { frame, state, held } = site;
  const { struts } = frame;
  const between = state.between();
  const ofHeld = held
    ? between.filter(
        (strut) => struts[strut]!.some((joint) => held.joints.has(joint)) && !state.blocks([strut]),
      )
    : [];
  if (held && ofHeld.length > 0) return steadying(site, held, ofHeld, () => (site.held = null));
  site.held = null;
  return best(
    between.map((strut) => ({
      blocks: state.blocks([strut]),
      lying: isLying(site, struts[strut]!),
      loose: 0,
      triangles: state.trianglesOver(...struts[strut]!),
      rank: 0,
      index: strut,
      take: () => {
        state.fasten(strut);
        return {
          kind: 'strut',
          struts: [strut],
          joints: [...struts[strut]!],
          hold: null,
          lying: isLying(site, struts[strut]!),
        };
      },
    })),
  );
}

/** The flat that lies parallel under another one that is tied to a joint of it. */
function flatUnder({ state, planes }: Site, flat: number, joint: number): Hold['over'] {
  const under = state
    .flatsAt(joint)
    .find(
      (other) =>
        !state.unplaced.has(other) && Math.abs(dot(planes[other]!.normal, planes[flat]!.normal)) > PARALLEL,
    );
  if (under === undefined) return null;
  return { flat: under, mm: Math.abs(above(planes[under]!, planes[flat]!.point)) };
}

/** A flat that shares joints with what is there, or is tied to it by struts. */
function joining(site: Site, flat: number): Choice | undefined {
  const { frame, state } = site;
  const ring = site.flats[flat]!;
  const shared = ring.joints.filter((joint) => state.isThere(joint));
  const ties = ring.joints
    .filter((joint) => !state.isThere(joint))
    .flatMap((joint) => state.tiesOf(joint))
    .filter(({ strut }) => !state.blocks([strut], flat))
    .sort((a, b) => a.strut - b.strut);
  const [first] = ties;
  if (shared.length === 0 && !first) return undefined;
  const fixed = fixedBy(shared.map((joint) => frame.joints[joint]!));
  const lying = isLying(site, ring.joints);
  return {
    blocks: state.blocks(ring.struts, flat),
    lying,
    loose: BODY - Math.min(BODY, fixed + ties.length),
    triangles: 0,
    rank: 0,
    index: flat,
    take: () => {
      const over = shared.length === 0 && first ? flatUnder(site, flat, first.to) : null;
      state.place(flat);
      const held: Held = {
        flat,
        joints: new Set(ring.joints.filter((joint) => !shared.includes(joint))),
        fixed,
        glued: [],
        over,
      };
      site.held = fixed >= BODY || lying ? null : held;
      if (shared.length > 0 || !first) return { kind: 'join', flat, struts: [], joints: shared, lying };
      held.fixed += 1;
      held.glued.push(first.joint);
      state.fasten(first.strut);
      return {
        kind: 'strut',
        struts: [first.strut],
        joints: [first.to, first.joint],
        hold: { flat, first: true, over: lying ? null : over },
        lying,
      };
    },
  };
}

/** A new joint in the air, with the struts that reach it from what is there. */
function raising(site: Site, joint: number): Choice | undefined {
  const { state } = site;
  const all = state.tiesOf(joint);
  if (all.length === 0) return undefined;
  const free = all.filter(({ strut }) => !state.blocks([strut]));
  const ties = free.length > 0 ? free : all;
  const triangles = ties.flatMap((a, at) =>
    ties.slice(at + 1).filter((b) => state.isTied(a.to, b.to)),
  ).length;
  const lying = isLying(site, [joint, ...ties.map(({ to }) => to)]);
  return {
    blocks: free.length === 0,
    lying,
    loose: POINT - Math.min(POINT, ties.length),
    triangles,
    rank: 1,
    index: joint,
    take: () => {
      const now = [...ties].sort((a, b) => a.strut - b.strut).slice(0, AT_ONCE);
      for (const { strut } of now) state.fasten(strut);
      return {
        kind: 'raise',
        struts: now.map(({ strut }) => strut),
        joints: [...now.map(({ to }) => to), joint],
        joint,
        prop: ties.length < 2 && !lying,
        lying,
      };
    },
  };
}

/** Nothing can be built on: the next flat, or a low strut with many others at its ends, lies on the bench. */
function beginning(site: Site, isFirst: boolean): NextMove | null {
  const { frame, state } = site;
  const { joints, struts } = frame;
  const [flat] = state.unplaced;
  if (flat !== undefined) {
    state.place(flat);
    if (!isFirst) return { kind: 'join', flat, struts: [], joints: [], lying: true };
    const plane = site.planes[flat]!;
    site.onBench = new Set(
      joints.flatMap((place, joint) => (Math.abs(above(plane, place)) <= BENCH_MM ? [joint] : [])),
    );
    return null;
  }
  const ends = joints.map(() => 0);
  for (const strut of struts) for (const joint of strut) ends[joint]! += 1;
  const low = (strut: number) => Math.min(...struts[strut]!.map((joint) => joints[joint]!.z));
  const near = (strut: number) => struts[strut]!.reduce((sum, joint) => sum + ends[joint]!, 0);
  const start = [...state.open].sort((a, b) => low(a) - low(b) || near(b) - near(a) || a - b)[0]!;
  state.fasten(start);
  return { kind: 'begin', struts: [start], joints: [...struts[start]!] };
}

/**
 * The order in which flats and struts are put together once the flats are made.
 * @param frame a valid frame, mm
 * @param flats rings without a common strut; the first stays lying and the rest is built on it
 * @param laid struts that are already in flats or across them
 * @returns moves of the kinds begin, join, raise and strut. A strut between joints that are there goes in at once, the one that closes
 *   most triangles first; otherwise what will be held most firmly: flats by shared joints and struts between, new joints by their struts.
 *   What lies in the plane of the first flat is done before any lifting. Struts through the inside of a flat that is still to come wait for it, where anything else can be done.
 * Source: own.
 */
export function orderRaised(frame: Frame, flats: readonly Ring[], laid: ReadonlySet<number>): NextMove[] {
  const state = buildState(frame, flats, laid);
  const planes = flats.map((ring) => ringPlane(ring.joints.map((joint) => frame.joints[joint]!)));
  const site: Site = { frame, flats, planes, state, held: null, onBench: new Set() };
  const moves: NextMove[] = [];
  let isFirst = true;
  while (state.open.size + state.unplaced.size > 0) {
    const close = closing(site);
    const next =
      close && !close.blocks
        ? close
        : best([
            ...(close ? [close] : []),
            ...[...state.unplaced].flatMap((flat) => joining(site, flat) ?? []),
            ...frame.joints.flatMap((_, joint) =>
              state.isThere(joint) || state.flatsAt(joint).some((flat) => state.unplaced.has(flat))
                ? []
                : (raising(site, joint) ?? []),
            ),
          ]);
    const move = next ? next.take() : beginning(site, isFirst);
    if (move) moves.push(move);
    isFirst = false;
  }
  return moves;
}
