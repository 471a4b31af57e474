import type { DrawingSettings } from '../contracts/drawing';
import type {
  SplitGroup,
  SplitMeeting,
  SplitPiece,
  SplitPlan,
  SplitWish,
  StrutKey,
} from '../contracts/split';
import { joinDrawing, type JoinedDrawing, type PlacedFrame } from '../frames/drawing';
import { strutLengths, type Frame, type Joint } from '../frames/frame';
import { cross, dot, size as length, subtract, unit } from '../frames/vector';
import { densityOf, stickKg } from '../frames/wood';
import type { LinearSolver } from '../kernel/linear-program';
import { againstLimits, splitByLimits, type SplitLimits } from './limits';
import { bitsOf, fieldJointsOf, netOf } from './partition';
import {
  assemblyMoves,
  chooseFlats,
  moveStruts,
  numberedPieces,
  pieceAdjacency,
  pieceMarks,
  type NumberedPieces,
} from './pieces';
import { stiffnessCount } from './pieces/stiffness-count';

/** How a long computation gets at its solver, is watched and stopped. */
export interface PlanControl {
  solver: LinearSolver;
  shouldStop(): boolean;
  progress(share: number, note: string): void;
}

interface Drawn {
  placements: readonly PlacedFrame[];
  frames: ReadonlyMap<string, Frame>;
  settings: DrawingSettings;
  wish: SplitWish;
}

/** What a split is computed from. */
export interface PlanSplitInput extends Drawn {
  /** Pieces that stay as they are: those that were kept, and those on which work has begun. */
  kept: readonly { key: string; struts: readonly StrutKey[] }[];
}

/** A split and how it is to be changed by hand. */
export interface ReviseSplitInput extends Drawn {
  plan: SplitPlan;
  /** Struts by index into the plan; `to` a piece's key, or null for a piece of its own. */
  move: { struts: readonly number[]; to: string | null };
}

/** Time for the cut itself, ms; the pieces' own plans come on top. */
const SPLIT_MS = 20_000;
/** Share of the progress that the cut itself takes. */
const CUT_SHARE = 0.6;
/** A piece is not searched for its very best flats for longer than this, s, and all of them together not longer than that, ms. */
const FLATS_SECONDS = 1;
const ALL_FLATS_MS = 8_000;
/** Beyond this many joints a piece's stiffness is not counted piece by piece: nobody carries such a piece. */
const MOST_JOINTS_COUNTED = 400;

const textOf = (key: StrutKey): string => key.join('/');

/**
 * Splits a drawing into pieces that a crew can build and carry, each with its flats and moves, identical ones found.
 * @param input placed frames (mm), what turns them into wood, limits, and pieces that stay
 * @param control solver, progress and stop; stopped early it returns what it has
 * @returns the plan with its figures; notes say what could not be met
 * @throws SplitRefusal in words when no split can do
 * Source: own; see `splitByLimits`, `identicalPieces`, `chooseFlats`, `assemblyMoves`.
 */
export function planSplit(input: PlanSplitInput, control: PlanControl): SplitPlan {
  const started = performance.now();
  const drawing = joinDrawing(input.placements, input.frames, input.settings.joinWithinMm);
  const notes = notesOf(drawing);
  const index = new Map(drawing.sources.map((source, strut) => [textOf(source), strut]));
  const kept = input.kept.flatMap(({ key, struts }) => {
    const found = struts.map((strut) => index.get(textOf(strut))).filter((strut) => strut !== undefined);
    if (found.length === struts.length) return [{ key, struts: found }];
    notes.push(
      `A piece that was to stay has ${struts.length - found.length} struts that the drawing does not have any more; it is split anew.`,
    );
    return [];
  });
  control.progress(0, 'cutting');
  const { frame } = drawing;
  const split = splitByLimits(
    {
      joints: frame.joints,
      struts: frame.struts,
      massKg: massesOf(frame, input.settings),
      limits: limitsOf(input.wish),
      pieces: input.wish.pieces,
      kept: kept.map(({ struts }) => struts),
      seed: input.wish.seed,
      milliseconds: SPLIT_MS,
    },
    { shouldStop: control.shouldStop, progress: (share) => control.progress(share * CUT_SHARE, 'cutting') },
  );
  notes.push(...split.notes);
  const seconds = (performance.now() - started) / 1000;
  const keys = keysFor(
    split.pieces,
    kept.map(({ key }) => key),
  );
  const plan = describe(drawing, split.pieceOf, keys, input, control);
  return {
    ...plan,
    figures: {
      ...plan.figures,
      imbalancePct: split.imbalancePct,
      seconds,
      baseline: {
        randomGrowth: split.baseline?.randomGrowth ?? null,
        coordinateBisection: split.baseline?.coordinateBisection ?? null,
      },
    },
    notes,
  };
}

/**
 * Gives struts to another piece; figures, field joints, flats and moves follow.
 * @param input the drawing, the plan and the move
 * @param control solver, progress and stop
 * @returns the plan with its pieces under their old keys, or the same plan and why it cannot be: a piece would fall apart, nothing to move
 */
export function reviseSplit(
  input: ReviseSplitInput,
  control: PlanControl,
): { plan: SplitPlan; problem: string | null } {
  const { plan, move } = input;
  const drawing = joinDrawing(input.placements, input.frames, input.settings.joinWithinMm);
  const pieceOf = new Array<number>(plan.struts.length).fill(-1);
  plan.pieces.forEach((piece, at) => piece.struts.forEach((strut) => (pieceOf[strut] = at)));
  const to = move.to === null ? null : plan.pieces.findIndex((piece) => piece.key === move.to);
  if (to === -1) return { plan, problem: 'That piece is not there any more. Load the split again.' };
  const moved = moveStruts({ frame: drawing.frame, pieceOf, pieces: plan.pieces.length }, move.struts, to, {
    codes: plan.pieces.map((piece) => `Piece ${piece.mark.letter}`),
  });
  if (!moved.ok) return { plan, problem: moved.refusal.message };
  const apart = moved.value.problems.filter((problem) => problem.code === 'PIECE_IN_PARTS');
  if (apart.length > 0) return { plan, problem: apart.map((problem) => problem.message).join(' ') };
  const keys = keysFor(
    moved.value.split.pieces,
    plan.pieces.map((piece) => piece.key),
  );
  const { pieces, renumbered } = withoutEmpty(moved.value.split.pieceOf, keys);
  const revised = describe(drawing, renumbered, pieces, input, control, plan.groups);
  return {
    plan: {
      ...revised,
      figures: {
        ...plan.figures,
        pieces: revised.pieces.length,
        fieldJoints: revised.figures.fieldJoints,
        imbalancePct: moved.value.after.imbalancePct,
      },
      notes: plan.notes,
    },
    problem: null,
  };
}

/** Pieces that are given, to be planned anew. */
export interface PlanPiecesInput extends Drawn {
  plan: SplitPlan;
  /** Every strut of the drawing in exactly one; a piece in several bits becomes several. */
  pieces: readonly { key: string | null; struts: readonly StrutKey[] }[];
}

/**
 * Plans given pieces: flats, moves, marks and figures for each.
 * @param input the drawing, the plan they come from, and the pieces by the keys of their struts
 * @param control solver, progress and stop
 * @returns the plan; a piece that lies in several bits is several pieces, the first of them under its key
 */
export function planPieces(input: PlanPiecesInput, control: PlanControl): SplitPlan {
  const drawing = joinDrawing(input.placements, input.frames, input.settings.joinWithinMm);
  const index = new Map(drawing.sources.map((source, strut) => [textOf(source), strut]));
  const given = new Int32Array(drawing.sources.length).fill(-1);
  input.pieces.forEach(({ struts }, piece) => {
    for (const key of struts) {
      const strut = index.get(textOf(key));
      if (strut !== undefined) given[strut] = piece;
    }
  });
  const { joints, struts } = drawing.frame;
  const bits = bitsOf(
    netOf(
      joints,
      struts,
      struts.map(() => 1),
    ),
    given,
  );
  const pieceOf = new Int32Array(struts.length);
  const known: string[] = [];
  const used = new Set<string>();
  bits.forEach((bit, at) => {
    for (const strut of bit.struts) pieceOf[strut] = at;
    const key = input.pieces[bit.piece]?.key ?? null;
    known.push(key !== null && !used.has(key) ? key : '');
    if (key !== null) used.add(key);
  });
  const free = keysFor(bits.length + used.size, [...used]).slice(used.size);
  const keys = known.map((key) => (key === '' ? free.shift()! : key));
  const planned = describe(drawing, pieceOf, keys, input, control, input.plan.groups);
  return {
    ...planned,
    figures: {
      ...input.plan.figures,
      pieces: planned.pieces.length,
      fieldJoints: planned.figures.fieldJoints,
    },
    notes: input.plan.notes,
  };
}

/** Pieces that gave all their struts away are gone. */
function withoutEmpty(
  pieceOf: readonly number[],
  keys: readonly string[],
): { pieces: string[]; renumbered: number[] } {
  const used = [...new Set(pieceOf)].sort((a, b) => a - b);
  const place = new Map(used.map((piece, at) => [piece, at]));
  return {
    pieces: used.map((piece) => keys[piece]!),
    renumbered: pieceOf.map((piece) => place.get(piece)!),
  };
}

/** Keys for pieces: the known ones first, then the lowest numbers that are free. */
function keysFor(count: number, known: readonly string[]): string[] {
  const keys = known.slice(0, count);
  const taken = new Set(keys);
  for (let number = 1; keys.length < count; number += 1) {
    const key = `p${number}`;
    if (!taken.has(key)) keys.push(key);
  }
  return keys;
}

function notesOf({ doubled, vanished, missing }: JoinedDrawing): string[] {
  const notes: string[] = [];
  if (doubled.length > 0)
    notes.push(
      `${doubled.length} ${doubled.length === 1 ? 'strut lies' : 'struts lie'} on another one and ${doubled.length === 1 ? 'counts' : 'count'} once. Where two frames share an edge that is right; elsewhere move one of them.`,
    );
  if (vanished.length > 0)
    notes.push(
      `${vanished.length} ${vanished.length === 1 ? 'strut is' : 'struts are'} shorter than the distance at which joints become one, and left out. Make that distance smaller.`,
    );
  if (missing.length > 0) notes.push(`${missing.length} placed frames are not there any more.`);
  return notes;
}

const limitsOf = (wish: SplitWish): SplitLimits => ({
  mostStruts: wish.mostStruts,
  mostMinutes: wish.mostMinutes,
  minutesPerCut: wish.minutesPerCut,
  minutesPerJoint: wish.minutesPerJoint,
  box: wish.box,
  mostKg: wish.mostKg,
});

function massesOf(frame: Frame, settings: DrawingSettings): number[] {
  const density = densityOf(settings.species);
  return strutLengths(frame).map((length) => stickKg(length, settings.strutDiameterMm, density));
}

type Described = Pick<SplitPlan, 'struts' | 'pieces' | 'groups' | 'meetings' | 'figures'>;

/** Everything that follows from which strut is in which piece. */
function describe(
  drawing: JoinedDrawing,
  pieceOf: ArrayLike<number>,
  keys: readonly string[],
  { settings, wish }: Pick<Drawn, 'settings' | 'wish'>,
  control: PlanControl,
  before: readonly SplitGroup[] = [],
): Described {
  // Pieces that stayed as they were keep their flats and moves.
  const known = new Map(before.map((group) => [JSON.stringify(group.frame), group]));
  const { frame } = drawing;
  const numbered = numberedPieces(frame, Array.from(pieceOf), { withinMm: settings.cutWithinMm });
  const marks = pieceMarks(numbered.pieces.length, pieceAdjacency(numbered.pieces)).marks;
  const masses = massesOf(frame, settings);
  const limits = limitsOf(wish);
  const mechanisms = new Map<number, number>();
  const exactUntil = performance.now() + ALL_FLATS_MS;
  const groups = numbered.groups.map((group, at): SplitGroup => {
    control.progress(CUT_SHARE + ((1 - CUT_SHARE) * at) / numbered.groups.length, 'flats and moves');
    const first = numbered.pieces[group.first]!.frame;
    mechanisms.set(at, mechanismsOf(first));
    const same = known.get(JSON.stringify(first));
    if (same) return same;
    // A net that is flat as a whole is glued on the bench as it lies; and where somebody waits, the short search will do.
    const short =
      control.shouldStop() || performance.now() > exactUntil || liesFlat(first, settings.cutWithinMm);
    const flats = chooseFlats(first, short ? {} : { solver: control.solver, seconds: FLATS_SECONDS });
    return {
      frame: first,
      flats,
      moves: assemblyMoves(first, flats.flats),
      braces: [] as [number, number][],
    };
  });
  for (const group of groups)
    group.braces = group.moves.flatMap((move) =>
      move.kind === 'brace' && move.flat === null ? move.braces : [],
    );
  const pieces = numbered.pieces.map((piece, at): SplitPiece => {
    const likeness = numbered.likenesses[at]!;
    const figures = againstLimits(
      { joints: frame.joints, struts: frame.struts, massKg: masses, limits },
      piece.struts,
    );
    return {
      key: keys[at]!,
      mark: marks[at]!,
      struts: piece.struts,
      joints: piece.joints,
      group: likeness.group,
      hand: likeness.hand,
      mirrored: likeness.kind === 'mirror',
      motion: likeness.motion,
      minutes: figures.minutes,
      massKg: figures.massKg,
      sizeMm: figures.sizeMm,
      mechanisms: mechanisms.get(likeness.group) ?? 0,
    };
  });
  return {
    struts: drawing.sources,
    pieces,
    groups,
    meetings: meetingsOf(numbered, keys, frame),
    figures: {
      struts: frame.struts.length,
      pieces: pieces.length,
      fieldJoints: fieldJointsOf(
        netOf(
          frame.joints,
          frame.struts,
          frame.struts.map(() => 1),
        ),
        pieceOf,
      ),
      imbalancePct: null,
      seconds: 0,
      baseline: { randomGrowth: null, coordinateBisection: null },
    },
  };
}

/** Whether all joints of a frame lie in one plane. */
function liesFlat({ joints }: Frame, withinMm: number): boolean {
  const [origin] = joints;
  if (!origin || joints.length < 4) return true;
  // The farthest from the first, and of the rest the farthest from that line, span the plane best.
  const from = (joint: Joint) => subtract(joint, origin);
  const farthest = (size: (joint: Joint) => number) =>
    joints.reduce((best, joint) => (size(joint) > size(best) ? joint : best), origin);
  const along = unit(from(farthest((joint) => length(from(joint)))));
  const aside = cross(along, from(farthest((joint) => length(cross(along, from(joint))))));
  if (length(aside) <= withinMm) return true;
  const up = unit(aside);
  return joints.every((joint) => Math.abs(dot(up, from(joint))) <= withinMm);
}

/** Ways in which a piece can move as if its joints were pins, rigid motions left out; 0 where it is too large to be asked. */
function mechanismsOf({ joints, struts }: Frame): number {
  if (joints.length < 3 || joints.length > MOST_JOINTS_COUNTED) return 0;
  const count = stiffnessCount(joints);
  for (const [a, b] of struts) count.add(a, b);
  return Math.max(0, 3 * joints.length - 6 - count.rank);
}

/** The joints that two pieces share, for every two that meet; a joint of three pieces belongs to two of the pairs. */
function meetingsOf({ pieces }: NumberedPieces, keys: readonly string[], frame: Frame): SplitMeeting[] {
  const at = new Map<number, number[]>();
  pieces.forEach(({ joints }, piece) =>
    joints.forEach((joint) => {
      const list = at.get(joint);
      if (list) list.push(piece);
      else at.set(joint, [piece]);
    }),
  );
  const lowest = frame.joints.reduce((least, joint) => Math.min(least, joint.z), Infinity);
  const pairs = new Map<string, SplitMeeting>();
  for (const joint of [...at.keys()].sort((a, b) => a - b)) {
    const there = at.get(joint)!;
    // Glued on one after the other: each further piece to the first of them, so that a joint counts once less than its pieces.
    const [first, ...others] = there;
    for (const other of others) {
      const key = `${first}-${other}`;
      const known = pairs.get(key);
      const height = frame.joints[joint]!.z - lowest;
      if (known) {
        known.joints.push(joint);
        known.heightMm = Math.max(known.heightMm, height);
      } else pairs.set(key, { a: keys[first!]!, b: keys[other]!, joints: [joint], heightMm: height });
    }
  }
  return [...pairs.values()];
}
