import { problemList, readFileNumber, shownWord } from './file-problems';
import type { ObjProblemCode, ObjProblemList } from './obj-problems';
import { objKeyword, objStatements } from './obj-statements';
import type { ObjStatement, ObjWord } from './obj-statements';
import { FRAME_LIMITS } from './validate-frame';
import type { Vector } from './vector';

/** A joint as the file has it; no place when its numbers are bad. */
export type ReadJoint = { line: number; place: Vector | null };

/** A line or face as the file has it; joint indexes from 0. Only those whose every index exists are handed on. */
export type ReadElement = { kind: 'line' | 'face'; line: number; joints: number[] };

export type ReadObj = {
  joints: ReadJoint[];
  elements: ReadElement[];
  problems: ObjProblemList[];
  curvedLines: number[];
  lastLine: number;
};

const REFERENCE = /^([+-]?\d+)(\/[+-]?\d*){0,2}$/;

function readNumber({ text, line }: ObjWord, problems: ObjProblemList): number | null {
  const read = readFileNumber(text);
  if ('value' in read) return read.value;
  problems.add(
    'OBJ_NOT_A_NUMBER',
    line,
    () => `${shownWord(text)} ${read.wrong}, so the joint has no place. Export the file again or correct it.`,
  );
  return null;
}

function readJoint(statement: ObjStatement, mmPerUnit: number, problems: ObjProblemList): ReadJoint {
  const { line, words, openEnd } = statement;
  const numbers = words.map((word) => readNumber(word, problems));
  if (words.length < 3 || openEnd) {
    problems.add('OBJ_CUT_OFF', line, () =>
      openEnd
        ? 'a joint (v) is to go on after its backslash, and the file ends. The file seems cut off here; get it again.'
        : `a joint (v) needs 3 numbers and has ${words.length}. The file seems cut off here; get it again.`,
    );
    return { line, place: null };
  }
  const [x, y, z] = numbers;
  if (numbers.includes(null) || typeof x !== 'number' || typeof y !== 'number' || typeof z !== 'number')
    return { line, place: null };
  const place = { x: x * mmPerUnit, y: y * mmPerUnit, z: z * mmPerUnit };
  if (Math.max(Math.abs(place.x), Math.abs(place.y), Math.abs(place.z)) > FRAME_LIMITS.coordinateMm) {
    problems.add(
      'OBJ_TOO_FAR',
      line,
      () => 'the joint is more than 1 km from the origin. Check the unit, or move the drawing to the origin.',
    );
    return { line, place: null };
  }
  return { line, place };
}

type RawElement = {
  kind: 'line' | 'face';
  line: number;
  refs: { index: number; asked: string; line: number }[];
};

function readElement(
  { line, words, openEnd }: ObjStatement,
  kind: 'line' | 'face',
  jointsSoFar: number,
  problems: ObjProblemList,
): RawElement | null {
  const least = kind === 'line' ? 2 : 3;
  if (words.length < least || openEnd) {
    const name = kind === 'line' ? 'a line (l)' : 'a face (f)';
    problems.add('OBJ_CUT_OFF', line, () =>
      openEnd
        ? `${name} is to go on after its backslash, and the file ends. The file seems cut off here; get it again.`
        : `${name} needs at least ${least} joints and has ${words.length}. The file seems cut off here; get it again.`,
    );
    return null;
  }
  const refs: RawElement['refs'] = [];
  for (const word of words) {
    const number = Number(REFERENCE.exec(word.text)?.[1] ?? 0);
    if (number === 0)
      problems.add(
        'OBJ_BAD_INDEX',
        word.line,
        () =>
          `${shownWord(word.text)} is no joint number. Joints count from 1, or from -1 backwards, such as 4, 4/2, 4//7 or -1.`,
      );
    // Negative numbers count back from the joints read so far: -1 is the last one.
    else
      refs.push({
        index: number > 0 ? number - 1 : jointsSoFar + number,
        asked: word.text,
        line: word.line,
      });
  }
  return refs.length === words.length ? { kind, line, refs } : null;
}

/**
 * First pass over an OBJ text: its joints and elements with their lines, and what is wrong with single lines.
 * @param text the file
 * @param mmPerUnit millimetres per unit of the file
 */
export function readObj(text: string, mmPerUnit: number): ReadObj {
  const problems = problemList<ObjProblemCode>();
  const missing = problemList<ObjProblemCode>();
  const joints: ReadJoint[] = [];
  const raw: RawElement[] = [];
  const curvedLines: number[] = [];
  let lastLine = 1;
  for (const statement of objStatements(text)) {
    lastLine = statement.words.at(-1)?.line ?? statement.line;
    const means = objKeyword(statement.keyword);
    if (means === 'joint') joints.push(readJoint(statement, mmPerUnit, problems));
    else if (means === 'line' || means === 'face') {
      const element = readElement(statement, means, joints.length, problems);
      if (element) raw.push(element);
    } else if (means === 'curved') curvedLines.push(statement.line);
    else if (means === 'unknown')
      problems.add(
        'OBJ_UNKNOWN_LINE',
        statement.line,
        () =>
          `${shownWord(statement.keyword)} begins no line of an OBJ file (v, l, f). Check that this is a Wavefront OBJ.`,
      );
  }
  // Looked up at the end, since a line may name a joint that comes after it.
  const elements: ReadElement[] = [];
  for (const { kind, line, refs } of raw) {
    const lost = refs.filter(({ index }) => !joints[index]);
    for (const ref of lost)
      missing.add(
        'OBJ_MISSING_JOINT',
        ref.line,
        () =>
          `${shownWord(ref.asked)} names a joint that is not there; the file has ${joints.length}. It seems cut off or put together wrongly.`,
      );
    if (lost.length === 0) elements.push({ kind, line, joints: refs.map(({ index }) => index) });
  }
  return { joints, elements, problems: [problems, missing], curvedLines, lastLine };
}
