import type { PieceMeeting } from './neighbours';

/** Two joints that a temporary stick is taped across. */
export type Brace = [number, number];

type Step = {
  /** Counts from 1 over the whole list. */
  number: number;
  /** Struts that are glued in this move. */
  struts: number[];
  /** Joints it is about. */
  joints: number[];
};

/**
 * One move of making a piece. Flats, struts and joints are indexes from 0; people are shown them counted from 1.
 * - `flat`: lay a ring flat on the bench, dot the joints with glue, let it cool · `lay`: a strut across a flat that still lies there
 * - `begin`: a strut on the bench, where there is no flat to begin with
 * - `brace`: a temporary stick or board, before a flat is lifted (`flat`) or before the whole is turned and glued out (`flat` null)
 * - `join`: a flat meets what is there at joints they share · `raise`: struts that meet at a new joint in the air
 * - `strut`: a strut between two joints that are there; with `hold` a flat is held in its place for it
 *   `lying`: all of it stays on the bench, in the plane of the first flat
 * - `glue-out`: the second layer · `take-off`: the braces · `clean`: strings of glue · `mark`: tape where neighbours meet
 */
export type Move = Step &
  (
    | { kind: 'flat' | 'lay'; flat: number }
    | { kind: 'begin' }
    | {
        kind: 'brace';
        flat: number | null;
        braces: Brace[];
        /** Too many ways to move for sticks: a board under the flat, hands on the whole. */
        board: boolean;
        /** In how many ways it can still move, as if every joint were a pin. */
        mechanisms: number;
      }
    | { kind: 'join'; flat: number; lying: boolean }
    | {
        kind: 'raise';
        /** The new joint. */
        joint: number;
        /** Its struts do not hold it by themselves: it is propped until the next ones do. */
        prop: boolean;
        lying: boolean;
      }
    | { kind: 'strut'; hold: Hold | null; lying: boolean }
    | {
        kind: 'glue-out';
        /** Of those, joints that other pieces are joined to on site. */
        open: number[];
      }
    | { kind: 'take-off'; braces: Brace[]; boards: number[] }
    | { kind: 'clean' }
    | { kind: 'mark'; meetings: PieceMeeting[] }
  );

/** A flat that hands hold while a strut is glued. */
export type Hold = {
  flat: number;
  /** Whether it was picked up for this move. */
  first: boolean;
  /** The flat it is held over at this distance, mm, where both lie parallel. */
  over: { flat: number; mm: number } | null;
};

type Unnumbered<M> = M extends unknown ? Omit<M, 'number'> : never;
/** A move before it has its place in the list. */
export type NextMove = Unnumbered<Move>;

/**
 * The struts of a piece in the order in which they are glued: the order in which they light up.
 * @param moves all moves of a piece
 * @returns strut indexes from 0
 */
export const strutsInOrder = (moves: readonly Move[]): number[] => moves.flatMap(({ struts }) => struts);
