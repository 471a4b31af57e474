import { ok, refuse } from '../kernel/result';
import type { Result } from '../kernel/result';
import { edgeKey, ringEdges } from './edge-key';
import { mergeProblems, problemList } from './file-problems';
import { SAME_WITHIN_MM, strutLengths } from './frame';
import type { Frame, Strut } from './frame';
import { firstAtPlace } from './near-points';
import type { ObjProblem, ObjProblemCode, ObjProblemList } from './obj-problems';
import { readObj } from './obj-read';
import type { ReadObj } from './obj-read';
import { FRAME_LIMITS } from './validate-frame';

export type { ObjProblem, ObjProblemCode } from './obj-problems';

/** The largest OBJ file that is read, bytes of UTF-8. */
export const OBJ_MOST_BYTES = 2_000_000;

/** What was done to a file on reading, in words for the person who imports it; `line` where it is about one line. */
export type ObjNote = { message: string; line?: number };

/** What an OBJ file gives. */
export type ObjReading = { frame: Frame; notes: ObjNote[] };

type Edges = { struts: Strut[]; faces: number[][]; problems: ObjProblemList; notes: ObjNote[] };

const noteMany = (lines: readonly number[], one: string, many: (count: number) => string): ObjNote[] =>
  lines.length === 0 ? [] : [{ line: lines[0]!, message: lines.length === 1 ? one : many(lines.length) }];

/** Struts and faces in the order of the file, with what is wrong with each. `place` maps a joint to the first at its place. */
function collectEdges({ joints, elements }: ReadObj, place: readonly number[]): Edges {
  const problems = problemList<ObjProblemCode>();
  const struts: Strut[] = [];
  const faces: number[][] = [];
  const seen = new Map<number, { lineOfL: number | null }>();
  const faceLines = new Map<string, number>();
  const repeated: number[] = [];

  const hasNoLength = (a: number, b: number, line: number): boolean => {
    const [from, to] = [joints[a]!, joints[b]!];
    if (place[a] !== place[b]) return false;
    const why =
      a === b
        ? `both ends are joint ${a + 1}`
        : `joints ${a + 1} and ${b + 1} (lines ${from.line} and ${to.line}) are at the same place, within ${SAME_WITHIN_MM} mm`;
    problems.add(
      'OBJ_ZERO_LENGTH',
      line,
      () => `a strut has no length, ${why}. Take it out, or check the unit.`,
    );
    return true;
  };

  const addStrut = (a: number, b: number, line: number, ofLine: boolean): void => {
    const [from, to] = [place[a]!, place[b]!];
    const key = edgeKey(from, to);
    const known = seen.get(key);
    if (!known) {
      seen.set(key, { lineOfL: ofLine ? line : null });
      struts.push([from, to]);
      if (struts.length === FRAME_LIMITS.struts + 1)
        problems.add(
          'OBJ_TOO_LARGE',
          line,
          () =>
            `here the file passes ${FRAME_LIMITS.struts.toLocaleString('en')} struts, the most one frame can have. Split the drawing.`,
        );
    } else if (ofLine && known.lineOfL !== null) {
      const other = known.lineOfL;
      problems.add(
        'OBJ_DOUBLED_STRUT',
        line,
        () =>
          `the strut from joint ${a + 1} to joint ${b + 1} is already on line ${other}. Take one of the two out.`,
        other,
      );
    }
    // A strut that is also the edge of a face is one strut, not two.
    else if (ofLine) known.lineOfL = line;
  };

  for (const { kind, line, joints: ring } of elements) {
    if (kind === 'line') {
      for (let at = 0; at + 1 < ring.length; at++)
        if (!hasNoLength(ring[at]!, ring[at + 1]!, line)) addStrut(ring[at]!, ring[at + 1]!, line, true);
      continue;
    }
    const edges = ringEdges(ring);
    if (edges.filter(([a, b]) => hasNoLength(a, b, line)).length > 0) continue;
    const welded = ring.map((joint) => place[joint]!);
    if (new Set(welded).size !== welded.length) {
      problems.add(
        'OBJ_BAD_FACE',
        line,
        () => 'the face passes one of its joints twice. Give each joint once, in order.',
      );
      continue;
    }
    for (const [a, b] of edges) addStrut(a, b, line, false);
    const name = [...welded].sort((a, b) => a - b).join(' ');
    if (faceLines.has(name)) repeated.push(line);
    else {
      faceLines.set(name, line);
      faces.push(welded);
    }
  }
  const notes = noteMany(
    repeated,
    'This face was there before and counts once.',
    (count) => `${count} faces were there before and count once.`,
  );
  return { struts, faces, problems, notes };
}

/** Leaves out joints without struts and numbers the others in the order of the file. */
function renumber(read: ReadObj, edges: Edges, place: readonly number[]): ObjReading {
  const held = new Set(edges.struts.flat());
  const numbers = new Map<number, number>();
  const loose: number[] = [];
  const joined: number[] = [];
  read.joints.forEach(({ line }, index) => {
    if (held.has(index)) numbers.set(index, numbers.size);
    else if (place[index] === index) loose.push(line);
    else joined.push(line);
  });
  const number = (joint: number) => numbers.get(joint)!;
  const frame: Frame = {
    joints: [...numbers.keys()].map((index) => read.joints[index]!.place!),
    struts: edges.struts.map(([a, b]): Strut => [number(a), number(b)]),
    faces: edges.faces.map((face) => face.map(number)),
  };
  const longest = strutLengths(frame).reduce((a, b) => Math.max(a, b), 0);
  const notes = [
    ...noteMany(
      joined,
      'This joint is where an earlier one is; the two are one joint.',
      (count) => `${count} joints are where earlier ones are; each place is one joint.`,
    ),
    ...noteMany(
      loose,
      'This joint belongs to no strut and was left out.',
      (count) => `${count} joints belong to no strut and were left out.`,
    ),
    ...edges.notes,
    ...noteMany(
      read.curvedLines,
      'A curved line or surface was left out: struts are straight.',
      (count) => `${count} lines of curves and surfaces were left out: struts are straight.`,
    ),
  ];
  if (longest < 20)
    notes.push({
      message: `The longest strut is ${longest.toFixed(1)} mm. OBJ files name no unit; if this one is in cm, m or inches, say so and read it again.`,
    });
  return { frame, notes };
}

function tooLarge(text: string): ObjProblem | null {
  const bytes = text.length > OBJ_MOST_BYTES ? text.length : new TextEncoder().encode(text).length;
  if (bytes <= OBJ_MOST_BYTES) return null;
  const line = text.slice(0, OBJ_MOST_BYTES).split(/\r\n|\n|\r/).length;
  return {
    code: 'OBJ_TOO_LARGE',
    line,
    message: `The file has ${(bytes / 1e6).toFixed(1)} MB; at most 2 MB are read, which ends near line ${line}. Export the wireframe only, or split the drawing.`,
  };
}

/**
 * Read a frame from a Wavefront OBJ file.
 * @param text the file as text, at most 2 MB of UTF-8. Read: `v` (further numbers than x y z are passed over), `l` polylines, `f`
 *   faces, whose edges become struts, each once; indexes as `4`, `4/2`, `4//7`, `4/2/7` or negative; comments; lines joined by a
 *   backslash. Texture, normals, groups and materials are passed over.
 * @param options `mmPerUnit`: millimetres per unit of the file, above 0, 1 when left out, as the format names no unit
 * @returns a frame that `validateFrame` accepts: struts and joints in the order of the file, joints within 0.1 mm of each other made
 *   one, joints without struts left out, each said in `notes`. Or the problems in the order of their lines, at most 50 entries, the
 *   last one saying how many more there are. An edge of several faces, or of a face and a line, is one strut; two lines are a fault.
 * Throws nothing, whatever the text.
 * Source: Wavefront Object Files (.obj) 3.0, appendix B1, from memory.
 */
export function parseObj(
  text: string,
  options: { mmPerUnit?: number } = {},
): Result<ObjReading, ObjProblem[]> {
  const large = tooLarge(text);
  if (large) return refuse([large]);
  const read = readObj(text, options.mmPerUnit ?? 1);
  const place = firstAtPlace(
    read.joints.map((joint) => joint.place),
    SAME_WITHIN_MM,
  );
  const edges = collectEdges(read, place);
  const whole = problemList<ObjProblemCode>();
  const held = [...new Set(edges.struts.flat())].sort((a, b) => a - b);
  const excess = held[FRAME_LIMITS.joints];
  if (excess !== undefined)
    whole.add(
      'OBJ_TOO_LARGE',
      read.joints[excess]!.line,
      () =>
        `here the file passes ${FRAME_LIMITS.joints.toLocaleString('en')} joints, the most one frame can have; it has ${held.length}. Split the drawing.`,
    );
  if (edges.struts.length === 0 && [...read.problems, edges.problems].every(({ count }) => count === 0))
    whole.add(
      'OBJ_NO_STRUTS',
      read.lastLine,
      () =>
        'the file ends without any line (l) or face (f), so there is nothing to cut. Export edges or faces too.',
    );
  const problems = mergeProblems([...read.problems, edges.problems, whole], 'OBJ_MORE_PROBLEMS');
  return problems.length > 0 ? refuse(problems) : ok(renumber(read, edges, place));
}

/**
 * A frame as a Wavefront OBJ file, which `parseObj` reads back to the same frame.
 * @param frame a valid frame, mm
 * @returns text with `v` for joints, `l` for every strut and `f` for faces, in the frame's order, lines ended by LF; numbers in full
 */
export function formatObj(frame: Frame): string {
  const lines = [
    '# Strutbee frame, millimetres, z upwards',
    ...frame.joints.map(({ x, y, z }) => `v ${x} ${y} ${z}`),
    ...frame.struts.map(([a, b]) => `l ${a + 1} ${b + 1}`),
    ...frame.faces.map((face) => `f ${face.map((joint) => joint + 1).join(' ')}`),
  ];
  return `${lines.join('\n')}\n`;
}
