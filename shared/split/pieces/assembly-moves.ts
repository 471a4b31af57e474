import type { Frame } from '../../frames/frame';
import { bracesFor, flatBraces, MOST_BRACES } from './braces';
import type { Brace, Move, NextMove } from './moves';
import type { PieceMeeting } from './neighbours';
import { orderRaised } from './raise-order';
import type { Ring } from './ring-plane';

export type AssemblyOptions = {
  /** Where other pieces meet this one; those joints stay open for the field joint and are marked with tape. */
  meetings?: readonly PieceMeeting[];
};

/** Struts across a flat, whose two ends are joints of it; each is laid in the first flat that has both. */
function chordsOf(frame: Frame, flats: readonly Ring[]): number[][] {
  const inFlat = new Set(flats.flatMap(({ struts }) => struts));
  const members = flats.map(({ joints }) => new Set(joints));
  const chords: number[][] = flats.map(() => []);
  frame.struts.forEach(([a, b], strut) => {
    const flat = inFlat.has(strut) ? -1 : members.findIndex((joints) => joints.has(a) && joints.has(b));
    if (flat >= 0) chords[flat]!.push(strut);
  });
  return chords;
}

/** Flats and the struts across them, while they lie on the bench. */
function onTheBench(frame: Frame, flats: readonly Ring[], chords: readonly number[][]): NextMove[] {
  return flats.flatMap((ring, flat): NextMove[] => [
    { kind: 'flat', flat, struts: [...ring.struts], joints: [...ring.joints] },
    ...chords[flat]!.map((strut): NextMove => ({
      kind: 'lay',
      flat,
      struts: [strut],
      joints: [...frame.struts[strut]!],
    })),
  ]);
}

/** The brace a flat needs before it is lifted; nothing for one that keeps its shape. Sticks lie elsewhere than those before it. */
function beforeLifting(
  frame: Frame,
  ring: Ring,
  flat: number,
  chords: readonly number[],
  taken: readonly Brace[],
): NextMove[] {
  const across = chords.map((strut) => frame.struts[strut]!);
  const { mechanisms, braces } = flatBraces(ring, across, frame.joints, {
    last: taken,
    never: frame.struts,
  });
  if (mechanisms === 0) return [];
  const board = mechanisms > MOST_BRACES || braces.length < mechanisms;
  const sticks = board ? [] : braces;
  return [{ kind: 'brace', flat, struts: [], joints: sticks.flat(), braces: sticks, board, mechanisms }];
}

/** The brace the whole needs while its glue is warm. */
function beforeGluingOut(frame: Frame, taped: readonly Brace[]): NextMove[] {
  const { mechanisms, braces } = bracesFor(
    frame.joints,
    [...frame.struts, ...taped],
    // Struts in one line, or one alone, cannot be stiffer than their number.
    Math.min(3 * frame.joints.length - 6, (frame.joints.length * (frame.joints.length - 1)) / 2),
    MOST_BRACES,
  );
  if (mechanisms === 0 || braces.length === 0) return [];
  return [
    {
      kind: 'brace',
      flat: null,
      struts: [],
      joints: braces.flat(),
      braces,
      board: mechanisms > MOST_BRACES,
      mechanisms,
    },
  ];
}

/** Joints where at least two of the piece's own struts are glued together. */
function gluedJoints(frame: Frame): number[] {
  const ends = frame.joints.map(() => 0);
  for (const strut of frame.struts) for (const joint of strut) ends[joint]! += 1;
  return ends.flatMap((count, joint) => (count > 1 ? [joint] : []));
}

/**
 * The moves in which a beginner makes a piece: flats on the bench, then what lifts and closes them, then the second layer.
 * @param frame a valid frame, mm; its numbers are the piece's
 * @param flats planar rings without a common strut (see `chooseFlats`), in the order in which they shall be numbered
 * @param options `meetings`: where neighbours meet (see `pieceMeetings`)
 * @returns numbered moves; every strut is glued in exactly one of them; from `begin` or the first flat on, every strut that is lifted
 *   touches what is there. What is fastened most firmly comes first, so that triangles close early.
 * Source: own. Common practice, no source: flat outlines first, then lifted and closed with single struts; a flat stays flexible until
 *   its second layer of glue.
 */
export function assemblyMoves(frame: Frame, flats: readonly Ring[], options: AssemblyOptions = {}): Move[] {
  if (frame.struts.length === 0) return [];
  const chords = chordsOf(frame, flats);
  const bench = onTheBench(frame, flats, chords);
  const raised = orderRaised(frame, flats, new Set(bench.flatMap(({ struts }) => struts)));

  const taped: Brace[] = [];
  const braced = raised.flatMap((move): NextMove[] => {
    const lifted =
      move.kind === 'join' ? move.flat : move.kind === 'strut' && move.hold?.first ? move.hold.flat : null;
    if (lifted === null || ('lying' in move && move.lying)) return [move];
    const before = beforeLifting(frame, flats[lifted]!, lifted, chords[lifted]!, taped);
    for (const one of before) if (one.kind === 'brace') taped.push(...one.braces);
    return [...before, move];
  });
  const whole = beforeGluingOut(frame, taped);
  const glued = gluedJoints(frame);
  const { meetings = [] } = options;
  const meets = new Set(meetings.map(({ joint }) => joint));
  const braces = [...taped, ...whole.flatMap((move) => (move.kind === 'brace' ? move.braces : []))];
  const boards = braced.flatMap((move) =>
    move.kind === 'brace' && move.board && move.flat !== null ? [move.flat] : [],
  );

  const last: NextMove[] = [...whole];
  if (glued.length > 0)
    last.push({
      kind: 'glue-out',
      struts: [],
      joints: glued,
      open: glued.filter((joint) => meets.has(joint)),
    });
  if (braces.length + boards.length > 0)
    last.push({ kind: 'take-off', struts: [], joints: braces.flat(), braces, boards });
  if (glued.length > 0) last.push({ kind: 'clean', struts: [], joints: glued });
  if (meetings.length > 0)
    last.push({
      kind: 'mark',
      struts: [],
      joints: meetings.map(({ joint }) => joint),
      meetings: [...meetings],
    });
  return [...bench, ...braced, ...last].map((move, at): Move => ({ ...move, number: at + 1 }));
}
