import { ok, refuse } from '../kernel/result';
import type { Result } from '../kernel/result';
import { readCsv } from './csv-read';
import type { CsvProblem, CsvProblemCode, CsvProblems, ReadCsv } from './csv-read';
import { edgeKey, ringEdges } from './edge-key';
import { mergeProblems, problemList, shownWord } from './file-problems';
import { SAME_WITHIN_MM } from './frame';
import type { Frame, Strut } from './frame';
import { firstAtPlace } from './near-points';
import { FRAME_LIMITS } from './validate-frame';

export type { CsvProblem, CsvProblemCode } from './csv-read';

/** The largest CSV file that is read, bytes of UTF-8. */
export const CSV_MOST_BYTES = 2_000_000;

/** What was done to a file on reading, in words; `line` where it is about one line. */
export type CsvNote = { message: string; line?: number };

/** What a CSV file gives. */
export type CsvReading = { frame: Frame; notes: CsvNote[] };

function checkPlaces({ joints }: ReadCsv, problems: CsvProblems): void {
  const first = firstAtPlace(
    joints.map(({ place }) => place),
    SAME_WITHIN_MM,
  );
  first.forEach((other, at) => {
    if (other === at) return;
    const [one, two] = [joints[other]!, joints[at]!];
    problems.add(
      'CSV_SAME_PLACE',
      two.line,
      () =>
        `joint ${shownWord(two.name)} is where joint ${shownWord(one.name)} of line ${one.line} is, within ${SAME_WITHIN_MM} mm. Make them one joint.`,
      one.line,
    );
  });
}

type Edges = { struts: Strut[]; faces: number[][]; added: number[] };

/** Struts as listed, then the edges of faces that no strut was listed for. */
function collectEdges({ joints, struts: listed, faces: rings }: ReadCsv, problems: CsvProblems): Edges {
  const edges: Edges = { struts: [], faces: [], added: [] };
  const lines = new Map<number, number>();
  const name = (joint: number): string => shownWord(joints[joint]!.name);
  for (const { line, joints: ends } of listed) {
    const [a, b] = [ends[0]!, ends[1]!];
    const other = lines.get(edgeKey(a, b));
    if (a === b)
      problems.add(
        'CSV_ZERO_LENGTH',
        line,
        () => `both ends of the strut are joint ${name(a)}. Take it out, or name another joint.`,
      );
    else if (other !== undefined)
      problems.add(
        'CSV_DOUBLED_STRUT',
        line,
        () =>
          `the strut from joint ${name(a)} to joint ${name(b)} is already on line ${other}. Take one of the two out.`,
        other,
      );
    else {
      lines.set(edgeKey(a, b), line);
      edges.struts.push([a, b]);
    }
  }
  for (const { line, joints: ring } of rings) {
    if (new Set(ring).size !== ring.length) {
      problems.add(
        'CSV_BAD_FACE',
        line,
        () => 'the face passes one of its joints twice. Give each joint once, in order round it.',
      );
      continue;
    }
    edges.faces.push(ring);
    for (const [a, b] of ringEdges(ring)) {
      if (lines.has(edgeKey(a, b))) continue;
      lines.set(edgeKey(a, b), line);
      edges.struts.push([a, b]);
      edges.added.push(line);
    }
  }
  return edges;
}

function checkSize(read: ReadCsv, { struts }: Edges, problems: CsvProblems): void {
  for (const [part, count, line] of [
    ['joints', read.joints.length, read.joints[FRAME_LIMITS.joints]?.line],
    ['struts', struts.length, read.struts[FRAME_LIMITS.struts]?.line],
  ] as const)
    if (count > FRAME_LIMITS[part])
      problems.add(
        'CSV_TOO_LARGE',
        line ?? read.lastLine,
        () =>
          `the file has ${count.toLocaleString('en')} ${part}; at most ${FRAME_LIMITS[part].toLocaleString('en')} can be one frame. Split the drawing.`,
      );
}

/** The frame with the joints that struts hold, in the order of the file. */
function renumber({ joints }: ReadCsv, { struts, faces, added }: Edges): CsvReading {
  const held = new Set(struts.flat());
  const kept = [...joints.keys()].filter((joint) => held.has(joint));
  const number = new Map(kept.map((joint, at) => [joint, at]));
  const loose = joints.filter((_, joint) => !held.has(joint));
  const notes: CsvNote[] = [];
  if (loose.length > 0)
    notes.push({
      line: loose[0]!.line,
      message:
        loose.length === 1
          ? `Joint ${shownWord(loose[0]!.name)} belongs to no strut and was left out.`
          : `${loose.length} joints belong to no strut and were left out.`,
    });
  if (added.length > 0)
    notes.push({
      line: added[0]!,
      message:
        added.length === 1
          ? 'An edge of a face had no strut; it was added.'
          : `${added.length} edges of faces had no strut; they were added.`,
    });
  return {
    frame: {
      joints: kept.map((joint) => joints[joint]!.place!),
      struts: struts.map(([a, b]): Strut => [number.get(a)!, number.get(b)!]),
      faces: faces.map((face) => face.map((joint) => number.get(joint)!)),
    },
    notes,
  };
}

/**
 * Read a frame from a CSV of joints and struts.
 * @param text the file, at most 2 MB of UTF-8: a heading `joint,x,y,z` with a row per joint (its name or number and three numbers), a
 *   heading `strut,from,to` with a row per strut (its number and two joints), and, if wanted, `face,joints` with a row per face (its
 *   number and its joints in order round it). Sections in any order and more than once, further columns passed over; cells parted by
 *   comma, semicolon or tab, with decimal commas in the last two.
 * @param options `mmPerUnit`: millimetres per unit of the file, above 0, 1 when left out
 * @returns a frame that `validateFrame` accepts, joints and struts in the order of the file, joints without struts left out and edges of
 *   faces without a strut added, each said in `notes`. Or the problems in the order of their lines, at most 50 entries, the last one
 *   saying how many more there are.
 * Throws nothing, whatever the text.
 * Source: RFC 4180; the columns are own.
 */
export function parseFrameCsv(
  text: string,
  options: { mmPerUnit?: number } = {},
): Result<CsvReading, CsvProblem[]> {
  const whole = problemList<CsvProblemCode>();
  // Every letter has at least a byte, so a long text need not be encoded to know that it is too large.
  const bytes = text.length > CSV_MOST_BYTES ? text.length : new TextEncoder().encode(text).length;
  if (bytes > CSV_MOST_BYTES) {
    whole.add(
      'CSV_TOO_LARGE',
      1,
      () => `the file has ${(bytes / 1e6).toFixed(1)} MB; at most 2 MB are read. Split the drawing.`,
    );
    return refuse([...whole.kept]);
  }
  const read = readCsv(text, options.mmPerUnit ?? 1);
  checkPlaces(read, whole);
  const edges = collectEdges(read, whole);
  checkSize(read, edges, whole);
  if (edges.struts.length === 0 && read.problems.count === 0 && whole.count === 0)
    whole.add(
      'CSV_NO_STRUTS',
      read.lastLine,
      () => 'the file ends without any strut, so there is nothing to cut. Add struts under strut,from,to.',
    );
  const problems = mergeProblems([read.problems, whole], 'CSV_MORE_PROBLEMS');
  return problems.length > 0 ? refuse(problems) : ok(renumber(read, edges));
}

/**
 * A frame as a CSV of joints and struts, which `parseFrameCsv` reads back to the same frame.
 * @param frame a valid frame, mm
 * @returns three sections, joints and struts numbered from 1, numbers in full, lines ended by CRLF; no section for faces where there are
 *   none
 * Source: RFC 4180.
 */
export function formatFrameCsv({ joints, struts, faces }: Frame): string {
  const lines = [
    'joint,x,y,z',
    ...joints.map(({ x, y, z }, at) => `${at + 1},${x},${y},${z}`),
    'strut,from,to',
    ...struts.map(([a, b], at) => `${at + 1},${a + 1},${b + 1}`),
    ...(faces.length > 0 ? ['face,joints'] : []),
    ...faces.map((face, at) => [at + 1, ...face.map((joint) => joint + 1)].join(',')),
  ];
  return `${lines.join('\r\n')}\r\n`;
}
