export type ObjProblemCode =
  | 'OBJ_TOO_LARGE'
  | 'OBJ_CUT_OFF'
  | 'OBJ_MISSING_JOINT'
  | 'OBJ_BAD_INDEX'
  | 'OBJ_NOT_A_NUMBER'
  | 'OBJ_TOO_FAR'
  | 'OBJ_ZERO_LENGTH'
  | 'OBJ_DOUBLED_STRUT'
  | 'OBJ_BAD_FACE'
  | 'OBJ_UNKNOWN_LINE'
  | 'OBJ_NO_STRUTS'
  | 'OBJ_MORE_PROBLEMS';

/** One thing wrong with an OBJ file. Lines count from 1; `otherLine` is the earlier line it clashes with. */
export type ObjProblem = { code: ObjProblemCode; line: number; message: string; otherLine?: number };

/** As many problems as a person can mend before they read the file again. */
const MOST_PROBLEMS = 50;

/** A list that keeps the first 50 problems and counts the rest. */
export type ProblemList = {
  add(code: ObjProblemCode, line: number, text: () => string, otherLine?: number): void;
  readonly count: number;
  readonly kept: readonly ObjProblem[];
};

/** A new, empty list. The text is made only for problems that are kept: garbage can have a million. */
export function problemList(): ProblemList {
  const kept: ObjProblem[] = [];
  let count = 0;
  return {
    add(code, line, text, otherLine) {
      count += 1;
      if (kept.length >= MOST_PROBLEMS) return;
      const message = `Line ${line}: ${text()}`;
      kept.push(otherLine === undefined ? { code, line, message } : { code, line, message, otherLine });
    },
    get count() {
      return count;
    },
    kept,
  };
}

/** Several lists as one in the order of the lines, at most 50 entries; the last one then says how many were left out. */
export function mergeProblems(lists: readonly ProblemList[]): ObjProblem[] {
  const count = lists.reduce((sum, list) => sum + list.count, 0);
  const sorted = lists.flatMap((list) => list.kept).sort((a, b) => a.line - b.line);
  if (count <= MOST_PROBLEMS) return sorted;
  const shown = sorted.slice(0, MOST_PROBLEMS - 1);
  const line = shown.at(-1)!.line;
  return [
    ...shown,
    {
      code: 'OBJ_MORE_PROBLEMS',
      line,
      message: `There are ${count - shown.length} more problems after these. Mend the ones above and read the file again.`,
    },
  ];
}
