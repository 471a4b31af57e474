/** One thing wrong with a file. Lines count from 1; `otherLine` is the earlier line it clashes with. */
export type FileProblem<C extends string> = { code: C; line: number; message: string; otherLine?: number };

/** As many problems as a person can mend before they read the file again. */
const MOST_PROBLEMS = 50;

/** A list that keeps the first 50 problems and counts the rest. */
export type ProblemList<C extends string> = {
  add(code: C, line: number, text: () => string, otherLine?: number): void;
  readonly count: number;
  readonly kept: readonly FileProblem<C>[];
};

/** A new, empty list. The text is made only for problems that are kept: garbage can have a million. */
export function problemList<C extends string>(): ProblemList<C> {
  const kept: FileProblem<C>[] = [];
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

/**
 * Several lists as one in the order of the lines, at most 50 entries.
 * @param lists problems found in several passes
 * @param more code of the last entry, which then says how many were left out
 */
export function mergeProblems<C extends string>(lists: readonly ProblemList<C>[], more: C): FileProblem<C>[] {
  const count = lists.reduce((sum, list) => sum + list.count, 0);
  const sorted = lists.flatMap((list) => list.kept).sort((a, b) => a.line - b.line);
  if (count <= MOST_PROBLEMS) return sorted;
  const shown = sorted.slice(0, MOST_PROBLEMS - 1);
  const line = shown.at(-1)!.line;
  return [
    ...shown,
    {
      code: more,
      line,
      message: `There are ${count - shown.length} more problems after these. Mend the ones above and read the file again.`,
    },
  ];
}

const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;
const NOT_FINITE = /^[+-]?(nan|inf|infinity|1\.#)/i;

/** A number as files write it, or what is wrong with it. */
export function readFileNumber(text: string): { value: number } | { wrong: string } {
  const value = NUMBER.test(text) ? Number(text) : Number.NaN;
  if (Number.isFinite(value)) return { value };
  return {
    wrong: NOT_FINITE.test(text) || NUMBER.test(text) ? 'is no finite number' : 'is not a number',
  };
}

/** A word of a file as messages quote it, cut where it is long. */
export const shownWord = (text: string): string =>
  JSON.stringify(text.length > 24 ? `${text.slice(0, 24)}…` : text);
