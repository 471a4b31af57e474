import { frameFigures } from '../../frames/frame-figures';
import { strutLengths } from '../../frames/frame';
import type { Frame } from '../../frames/frame';
import { formatLength } from '../../kernel/lengths';
import type { LengthUnit } from '../../kernel/lengths';
import type { Brace, Hold, Move } from './moves';

/** What struts are called on the bench: per strut the label of its length class and the length it is cut to, mm. */
export type StrutNames = { labels: readonly string[]; lengthsMm: readonly number[] };

const LETTERS = 26;
const FIRST_LETTER = 65;

/** A, B, ... Z, AA, AB, ... from 0. */
function letters(index: number): string {
  let rest = index;
  let text = '';
  for (;;) {
    text = String.fromCharCode(FIRST_LETTER + (rest % LETTERS)) + text;
    if (rest < LETTERS) return text;
    rest = Math.floor(rest / LETTERS) - 1;
  }
}

/**
 * Names of struts where nothing else names them: length classes of this frame alone, A the longest, lengths from joint to joint.
 * @param frame a valid frame, mm
 */
export function strutNames(frame: Frame): StrutNames {
  const labels: string[] = frame.struts.map(() => '');
  frameFigures(frame).lengthClasses.forEach(({ struts }, index) => {
    for (const strut of struts) labels[strut] = letters(index);
  });
  return { labels, lengthsMm: strutLengths(frame) };
}

const joined = (parts: readonly string[]): string =>
  parts.length < 2 ? parts.join('') : `${parts.slice(0, -1).join(', ')} and ${parts[parts.length - 1]!}`;

/** Numbers from 1 in rising order, four and more in a row drawn together: `1 to 8, 11 and 12`. */
function numbers(indexes: readonly number[]): string {
  const sorted = [...new Set(indexes)].sort((a, b) => a - b);
  const parts: string[] = [];
  for (let at = 0; at < sorted.length;) {
    let end = at;
    while (sorted[end + 1] === sorted[end]! + 1) end++;
    if (end - at >= 3) parts.push(`${sorted[at]! + 1} to ${sorted[end]! + 1}`);
    else for (let k = at; k <= end; k++) parts.push(String(sorted[k]! + 1));
    at = end + 1;
  }
  return joined(parts);
}

const word = (count: number, one: string): string => (count === 1 ? one : `${one}s`);
const jointsOf = (joints: readonly number[]): string => `${word(joints.length, 'joint')} ${numbers(joints)}`;
const across = (braces: readonly Brace[]): string =>
  joined(braces.map(([a, b]) => `joints ${a + 1} and ${b + 1}`));

function heldText(hold: Hold | null, length: (mm: number) => string): string {
  if (!hold) return '';
  const flat = `flat ${hold.flat + 1}`;
  if (!hold.first) return `Keep holding ${flat}. `;
  if (!hold.over) return `Hold ${flat} in its place, as the drawing shows. `;
  return `Hold ${flat} above flat ${hold.over.flat + 1}, ${length(hold.over.mm)} apart. `;
}

/**
 * A move in plain English, in the installation's unit.
 * @param move one of `assemblyMoves`
 * @param names labels and lengths of the piece's struts (see `strutNames`)
 * @param unit the installation's unit
 * @returns such as `Move 4. Hold flat 2 above flat 1, 200 mm apart. Glue strut 9 (B, 200 mm) from joint 3 to joint 7.`; numbers of
 *   flats, struts and joints count from 1
 */
export function moveText(move: Move, names: StrutNames, unit: LengthUnit): string {
  const length = (mm: number): string => formatLength(mm, unit);
  const described = (strut: number): string =>
    `${names.labels[strut] ?? ''}, ${length(names.lengthsMm[strut]!)}`;
  const strutsText = (struts: readonly number[]): string => {
    const kinds = [...new Set(struts.map(described))];
    return joined(
      kinds.map((kind) => {
        const alike = struts.filter((strut) => described(strut) === kind);
        const many = alike.length === 1 ? '' : alike.length === 2 ? 'both ' : 'all ';
        return `${word(alike.length, 'strut')} ${numbers(alike)} (${many}${kind})`;
      }),
    );
  };
  const [from, to] = [(move.joints[0] ?? 0) + 1, (move.joints[1] ?? 0) + 1];
  const text = (): string => {
    switch (move.kind) {
      case 'flat':
        return `Flat ${move.flat + 1}: lay ${strutsText(move.struts)} on wax paper as a ring round joints ${move.joints
          .map((joint) => joint + 1)
          .join(', ')}. Put a dot of glue at each joint. Let it cool.`;
      case 'lay':
        return `While flat ${move.flat + 1} lies on the paper, glue ${strutsText(move.struts)} across it from joint ${from} to joint ${to}. Let it cool.`;
      case 'begin':
        return `Lay ${strutsText(move.struts)} on the bench: one end is joint ${from}, the other joint ${to}.`;
      case 'brace':
        return braceText(move);
      case 'join':
        if (move.lying && move.joints.length > 0)
          return `Slide flat ${move.flat + 1} over the bench to what lies there, so that they meet at ${jointsOf(move.joints)}. Glue it there.`;
        if (move.joints.length === 0)
          return `Set flat ${move.flat + 1} beside what you have; it touches nothing yet.`;
        return `Hold flat ${move.flat + 1} in its place, so that it meets what you have at ${jointsOf(move.joints)}. Glue it there and hold still until the glue is firm.`;
      case 'raise': {
        const strut = (at: number) => `strut ${move.struts[at]! + 1} (${described(move.struts[at]!)})`;
        if (move.struts.length === 1)
          return `Glue ${strut(0)} from joint ${from}; its far end is joint ${move.joint + 1}. ${
            move.prop ? 'Prop it until the next strut holds it.' : 'Hold still until the glue is firm.'
          }`;
        const each = move.struts.map((_, at) => `${strut(at)} from joint ${move.joints[at]! + 1}`);
        return `Glue ${joined(each)}, so that they meet: that is joint ${move.joint + 1}. Hold still until the glue is firm.`;
      }
      case 'strut':
        if (move.lying && move.hold)
          return `Lay flat ${move.hold.flat + 1} on the bench beside what lies there, as the drawing shows. Glue ${strutsText(move.struts)} from joint ${from} to joint ${to}.`;
        return `${move.lying ? 'On the bench: glue' : `${heldText(move.hold, length)}Glue`} ${strutsText(move.struts)} from joint ${from} to joint ${to}.`;
      case 'glue-out':
        return `Second layer: go round ${jointsOf(move.joints)} with glue, from all sides. Let it cool.${
          move.open.length === 0
            ? ''
            : ` Keep ${jointsOf(move.open)} slim: other pieces are joined there on site.`
        }`;
      case 'take-off':
        return takeOffText(move);
      case 'clean':
        return `Pull off the strings of glue at ${jointsOf(move.joints)}.`;
      case 'mark':
        return `Stick a tape at each joint where another piece comes, and write on it: ${move.meetings
          .map(({ joint, tape }) => `joint ${joint + 1}: ${tape}`)
          .join('; ')}.`;
    }
  };
  return `Move ${move.number}. ${text()}`;
}

function braceText({ flat, board, braces, mechanisms }: Extract<Move, { kind: 'brace' }>): string {
  const stick = braces.length === 1 ? 'a temporary stick' : 'temporary sticks';
  if (flat !== null) {
    const why = `Flat ${flat + 1} bends easily until its second layer of glue.`;
    if (board) return `${why} Slide a stiff board under it, tape it down and lift it with the board.`;
    return `${why} Before you lift it, tape ${stick} across ${across(braces)}.`;
  }
  const ways = `While the glue is warm the piece can still move in ${mechanisms} ${word(mechanisms, 'way')}.`;
  if (!board) return `${ways} Before you turn it, tape ${stick} across ${across(braces)}.`;
  return `${ways} Tape temporary sticks at least across ${across(braces)}, compare the shape with the drawing, and turn it with two people.`;
}

function takeOffText({ braces, boards }: Extract<Move, { kind: 'take-off' }>): string {
  const sticks = braces.length === 0 ? [] : [`the ${word(braces.length, 'stick')} across ${across(braces)}`];
  const under =
    boards.length === 0 ? [] : [`the ${word(boards.length, 'board')} under flat ${numbers(boards)}`];
  return `When everything is cool, take off ${joined([...sticks, ...under])}.`;
}
