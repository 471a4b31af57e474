import type { z } from 'zod';
import type { FieldProblem } from '../../shared/contracts/errors';
import { fieldProblems } from '../../shared/contracts/problems';

/**
 * What a form holds, looked at with the schema the server looks at it with.
 * @param schema of shared/contracts
 * @param input what was typed, as the schema names it
 * @param own problems the form found itself, such as a length that is none; they stand before the schema's
 * @returns the body to send, or every problem
 */
export function checkInput<T>(
  schema: z.ZodType<T>,
  input: unknown,
  own: readonly FieldProblem[] = [],
): { body: T } | { problems: FieldProblem[] } {
  const parsed = schema.safeParse(input);
  if (parsed.success && own.length === 0) return { body: parsed.data };
  const known = new Set(own.map(({ path }) => path));
  const theirs = parsed.success ? [] : fieldProblems(parsed.error.issues);
  return { problems: [...own, ...theirs.filter(({ path }) => !known.has(path))] };
}

/** A typed number; undefined when nothing was typed, NaN when it is none. */
export const typedNumber = (text: string): number | undefined =>
  text.trim() === '' ? undefined : Number(text.trim().replace(',', '.'));
