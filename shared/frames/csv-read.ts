import { csvRows } from './csv-rows';
import type { CsvRow } from './csv-rows';
import { problemList, readFileNumber, shownWord } from './file-problems';
import type { FileProblem, ProblemList } from './file-problems';
import { FRAME_LIMITS } from './validate-frame';
import type { Vector } from './vector';

export type CsvProblemCode =
  | 'CSV_TOO_LARGE'
  | 'CSV_OPEN_QUOTE'
  | 'CSV_NO_HEADING'
  | 'CSV_BAD_HEADING'
  | 'CSV_TOO_FEW_CELLS'
  | 'CSV_NOT_A_NUMBER'
  | 'CSV_TOO_FAR'
  | 'CSV_NAME_TWICE'
  | 'CSV_SAME_PLACE'
  | 'CSV_MISSING_JOINT'
  | 'CSV_ZERO_LENGTH'
  | 'CSV_DOUBLED_STRUT'
  | 'CSV_BAD_FACE'
  | 'CSV_NO_STRUTS'
  | 'CSV_MORE_PROBLEMS';

/** One thing wrong with a CSV of joints and struts. */
export type CsvProblem = FileProblem<CsvProblemCode>;
export type CsvProblems = ProblemList<CsvProblemCode>;

/** A joint as the file has it; no place when its numbers are bad. */
type ReadJoint = { name: string; line: number; place: Vector | null };
/** Joints by index from 0; only what names existing joints is handed on. */
type ReadRing = { line: number; joints: number[] };

export type ReadCsv = {
  joints: ReadJoint[];
  struts: ReadRing[];
  faces: ReadRing[];
  problems: CsvProblems;
  lastLine: number;
};

type Section = 'joint' | 'strut' | 'face';
const HEADING: Readonly<Record<Section, string>> = {
  joint: 'joint,x,y,z',
  strut: 'strut,from,to',
  face: 'face,joints',
};

/** The section that a row opens, if it is a heading: its first word names the section, and no number follows. */
function sectionOf({ cells: [first = '', second = ''] }: CsvRow): Section | null {
  const word = first.toLowerCase().replace(/s$/, '');
  if (word !== 'joint' && word !== 'strut' && word !== 'face') return null;
  return /^[a-z]/i.test(second) || second === '' ? word : null;
}

/** Whether the columns after the first begin with the letters or words they should. */
function headingFits(section: Section, { cells }: CsvRow): boolean {
  const wanted = HEADING[section].split(',').slice(1);
  return section === 'face' || wanted.every((word, at) => cells[at + 1]?.toLowerCase().startsWith(word));
}

class Reading {
  readonly problems = problemList<CsvProblemCode>();
  readonly joints: ReadJoint[] = [];
  readonly rings: { kind: 'strut' | 'face'; row: CsvRow }[] = [];
  private readonly names = new Map<string, number>();

  constructor(
    private readonly mmPerUnit: number,
    private readonly decimalComma: boolean,
  ) {}

  joint({ line, cells }: CsvRow): void {
    const [name = '', ...rest] = cells;
    const known = this.names.get(name);
    if (name === '')
      this.problems.add('CSV_TOO_FEW_CELLS', line, () => 'the joint has no name. Give it a number.');
    else if (known !== undefined)
      this.problems.add(
        'CSV_NAME_TWICE',
        line,
        () =>
          `joint ${shownWord(name)} is already on line ${this.joints[known]!.line}. Give this one another number.`,
        this.joints[known]!.line,
      );
    else this.names.set(name, this.joints.length);
    this.joints.push({ name, line, place: this.place(line, rest.slice(0, 3)) });
  }

  private place(line: number, cells: string[]): Vector | null {
    if (cells.length < 3 || cells.includes('')) {
      this.problems.add(
        'CSV_TOO_FEW_CELLS',
        line,
        () => 'a joint needs its name and three numbers x, y and z. Fill in the ones that are missing.',
      );
      return null;
    }
    const numbers = cells.map((text) => this.number(line, text));
    const [x, y, z] = numbers;
    if (x == null || y == null || z == null) return null;
    if (Math.max(Math.abs(x), Math.abs(y), Math.abs(z)) <= FRAME_LIMITS.coordinateMm) return { x, y, z };
    this.problems.add(
      'CSV_TOO_FAR',
      line,
      () => 'the joint is more than 1 km from the origin. Check the unit, or move the drawing to the origin.',
    );
    return null;
  }

  private number(line: number, text: string): number | null {
    const read = readFileNumber(this.decimalComma ? text.replace(',', '.') : text);
    if ('value' in read) return read.value * this.mmPerUnit;
    this.problems.add(
      'CSV_NOT_A_NUMBER',
      line,
      () => `${shownWord(text)} ${read.wrong}, so the joint has no place. Correct it.`,
    );
    return null;
  }

  /** Struts and faces with their joints looked up, once all joints are read. */
  ringsOf(kind: 'strut' | 'face'): ReadRing[] {
    return this.rings.flatMap(({ kind: own, row: { line, cells } }) => {
      if (own !== kind) return [];
      const named = kind === 'strut' ? cells.slice(1, 3) : cells.slice(1).filter((name) => name !== '');
      const least = kind === 'strut' ? 2 : 3;
      if (named.length < least || named.includes('')) {
        const words =
          kind === 'strut' ? 'a strut needs its number and two joints' : 'a face needs at least 3 joints';
        this.problems.add('CSV_TOO_FEW_CELLS', line, () => `${words}. Fill in the ones that are missing.`);
        return [];
      }
      const joints = named.flatMap((name) => this.names.get(name) ?? []);
      for (const name of named)
        if (!this.names.has(name))
          this.problems.add(
            'CSV_MISSING_JOINT',
            line,
            () =>
              `there is no joint ${shownWord(name)}; the file has ${this.joints.length}. Add it, or name another one.`,
          );
      return joints.length === named.length ? [{ line, joints }] : [];
    });
  }
}

/**
 * First pass over a CSV of joints and struts: its rows with their lines, and what is wrong with single rows.
 * @param text the file
 * @param mmPerUnit millimetres per unit of the file
 */
export function readCsv(text: string, mmPerUnit: number): ReadCsv {
  const { rows, comma, openQuote } = csvRows(text);
  const reading = new Reading(mmPerUnit, comma !== ',');
  const { problems } = reading;
  if (openQuote !== null)
    problems.add(
      'CSV_OPEN_QUOTE',
      openQuote,
      () =>
        'a quoted cell is never closed, so the rest of the file was read as one cell. Close it or get the file again.',
    );
  let section: Section | null = null;
  let told = false;
  for (const row of rows) {
    const opens = sectionOf(row);
    if (opens) {
      section = opens;
      if (!headingFits(opens, row))
        problems.add(
          'CSV_BAD_HEADING',
          row.line,
          () => `the columns of the ${opens}s are ${HEADING[opens]}, in this order. Name and order them so.`,
        );
    } else if (section === 'joint') reading.joint(row);
    else if (section !== null) reading.rings.push({ kind: section, row });
    else if (!told) {
      told = true;
      problems.add(
        'CSV_NO_HEADING',
        row.line,
        () =>
          `a heading is missing. Begin the joints with a line ${HEADING.joint} and the struts with a line ${HEADING.strut}.`,
      );
    }
  }
  return {
    joints: reading.joints,
    struts: reading.ringsOf('strut'),
    faces: reading.ringsOf('face'),
    problems,
    lastLine: rows.at(-1)?.line ?? 1,
  };
}
