import { z } from 'zod';
import type { Frame } from '../frames';
import type { Flats, Motion, Move, PieceMark, PieceMeeting } from '../split';
import { codeLetterSchema } from './travellers';

const mm = z.number().positive().max(100_000);

/** What pieces are wanted and what a piece must not exceed; a limit that is null does not count. */
export const splitWishSchema = z.strictObject({
  /** Null: as few as the limits allow. */
  pieces: z.number().int().min(1).max(400).nullable(),
  mostStruts: z.number().int().min(1).max(5000).nullable(),
  /** Crew-minutes of building, by the minutes per cut and per joint below. */
  mostMinutes: z.number().min(1).max(10_000).nullable(),
  minutesPerCut: z.number().min(0).max(60),
  minutesPerJoint: z.number().min(0).max(60),
  /** What a piece must fit through or on, mm, turned by quarter turns. */
  box: z.strictObject({ x: mm, y: mm, z: mm }).nullable(),
  /** What two people may carry, kg. */
  mostKg: z.number().positive().max(200).nullable(),
  /** Keys of pieces of the present proposal that stay as they are. */
  keep: z.array(z.string().max(40)).max(400),
  seed: z.number().int().min(0).max(1_000_000_000),
});
export type SplitWish = z.infer<typeof splitWishSchema>;

export const DEFAULT_SPLIT_WISH: SplitWish = {
  pieces: null,
  mostStruts: 60,
  mostMinutes: null,
  minutesPerCut: 1.5,
  minutesPerJoint: 2,
  box: null,
  mostKg: 20,
  keep: [],
  seed: 1,
};

/** A strut of the drawing by where it comes from, so that it is found again when the drawing has changed. */
export type StrutKey = [placementId: string, copy: number, strut: number];

/** One piece of a split. */
export interface SplitPiece {
  /** Stays with the piece through hand edits. */
  key: string;
  mark: PieceMark;
  /** Struts of the drawing by index into the plan's `struts`. */
  struts: number[];
  /** For each joint of the piece the joint of the drawing, from 0. */
  joints: number[];
  /** Index into the plan's groups: pieces of one group are made from one drawing. */
  group: number;
  /** `right` and `left` where a group has both hands; null where it has not. */
  hand: 'left' | 'right' | null;
  mirrored: boolean;
  motion: Motion;
  minutes: number;
  massKg: number;
  /** Longest, middle and shortest side, mm. */
  sizeMm: [number, number, number];
  /** Ways in which it can move as a pin-jointed piece, rigid motions left out. */
  mechanisms: number;
}

/** A drawing that serves all pieces of one kind. */
export interface SplitGroup {
  frame: Frame;
  flats: Flats;
  moves: Move[];
  /** Temporary braces while the glue is warm: pairs of joints of the frame. */
  braces: [number, number][];
}

/** The joints where two pieces meet. */
export interface SplitMeeting {
  a: string;
  b: string;
  /** Joints of the drawing, from 0. */
  joints: number[];
  /** The highest of them over the lowest joint of the drawing. */
  heightMm: number;
}

/** What the split says of itself. */
export interface SplitFigures {
  struts: number;
  pieces: number;
  /** Sum over the joints of the pieces meeting there less one. */
  fieldJoints: number;
  /** Farthest that a piece's minutes lie from the mean, per cent; null where pieces were not asked to be alike. */
  imbalancePct: number | null;
  seconds: number;
  baseline: { randomGrowth: number | null; coordinateBisection: number | null };
}

export interface SplitPlan {
  struts: StrutKey[];
  pieces: SplitPiece[];
  groups: SplitGroup[];
  meetings: SplitMeeting[];
  figures: SplitFigures;
  /** What an organiser should know: limits that could not be met and the like. */
  notes: string[];
}

/** Where a sub-assembly lies in the split that it was made from. */
export interface SplitOrigin {
  splitId: string;
  /** Key of the piece; for a field joint, of the two that meet. */
  keys: string[];
  mark: PieceMark | null;
  hand: 'left' | 'right' | null;
  motion: Motion | null;
  struts: StrutKey[];
  /** For each joint of its frame the joint of the drawing. */
  joints: number[];
  massKg: number;
}

/** A split as the screen sees it. */
export interface SplitView {
  id: string;
  status: 'proposed' | 'taken' | 'replaced';
  /** The drawing has changed since: ask again, or take it as it was. */
  outOfDate: boolean;
  wish: SplitWish;
  plan: SplitPlan;
  madeAt: number;
  revision: number;
}

/** Struts given to another piece by hand. */
export const moveStrutsSchema = z.strictObject({
  /** Indexes into the plan's struts. */
  struts: z.array(z.number().int().min(0)).min(1, 'Choose struts first.').max(5000),
  /** Key of a piece, or null for a piece of its own. */
  to: z.string().max(40).nullable(),
  revision: z.number().int(),
});

/** Make travellers from a split. */
export const takeSplitSchema = z.strictObject({
  templateId: z.string().min(1, 'Please choose a template.').max(40),
  letter: codeLetterSchema,
  name: z.string().trim().min(1, 'Please fill this in.').max(40),
  /** Station of the field joints. */
  stationId: z.string().min(1, 'Please choose a station.').max(40),
  /** What to do when work has begun on pieces that would change. */
  begun: z.enum(['refuse', 'leave']),
  revision: z.number().int(),
});
export type TakeSplit = z.infer<typeof takeSplitSchema>;

/** The sheet of one piece: what a beginner needs to make it. */
export interface PieceSheet {
  id: string;
  code: string;
  name: string;
  travellerRevision: number;
  /** Joints in mm with the numbers that the moves use, counted from 0. */
  frame: Frame;
  mark: PieceMark | null;
  hand: 'left' | 'right' | null;
  massKg: number | null;
  /** Null for a piece that was made without a split. */
  flats: Flats | null;
  moves: Move[];
  /** Where other pieces meet it on site. */
  meetings: PieceMeeting[];
  /** Codes of pieces made from the same drawing. */
  alike: string[];
}
