/** A joint of a piece where other pieces meet it on site. Indexes from 0 in each piece's own numbering. */
export type PieceMeeting = {
  joint: number;
  /** In the order of the codes. */
  others: { piece: number; code: string; joint: number }[];
  /** What is written on the tape, the same on every piece that meets there: `V-07/3 = V-08/5`. */
  tape: string;
};

/** Order of codes as people count: V-9 before V-10. */
const byCode = new Intl.Collator('en', { numeric: true });

/**
 * Where each piece meets its neighbours.
 * @param pieces per piece, for each of its joints the joint of the drawing; indexes from 0 (see `numberedPieces`)
 * @param codes per piece its code, such as `V-07`
 * @returns per piece its field joints, rising by its own joint numbers; empty for a separate shape
 * Source: own.
 */
export function pieceMeetings(
  pieces: readonly { joints: readonly number[] }[],
  codes: readonly string[],
): PieceMeeting[][] {
  const at = new Map<number, { piece: number; code: string; joint: number }[]>();
  pieces.forEach(({ joints }, piece) =>
    joints.forEach((place, joint) => {
      const here = { piece, code: codes[piece] ?? '', joint };
      const list = at.get(place);
      if (list) list.push(here);
      else at.set(place, [here]);
    }),
  );
  for (const list of at.values()) list.sort((a, b) => byCode.compare(a.code, b.code) || a.piece - b.piece);
  return pieces.map(({ joints }, piece) =>
    joints.flatMap((place, joint): PieceMeeting[] => {
      const here = at.get(place)!;
      if (here.length < 2) return [];
      return [
        {
          joint,
          others: here.filter((one) => one.piece !== piece),
          tape: here.map((one) => `${one.code}/${one.joint + 1}`).join(' = '),
        },
      ];
    }),
  );
}

/**
 * Which pieces are neighbours.
 * @param pieces per piece, for each of its joints the joint of the drawing; indexes from 0
 * @returns per piece the pieces it shares a joint with, rising
 * Source: own.
 */
export function pieceAdjacency(pieces: readonly { joints: readonly number[] }[]): number[][] {
  const codes = pieces.map(() => '');
  return pieceMeetings(pieces, codes).map((meetings) =>
    [...new Set(meetings.flatMap(({ others }) => others.map(({ piece }) => piece)))].sort((a, b) => a - b),
  );
}
