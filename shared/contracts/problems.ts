import type { z } from 'zod';
import type { FieldProblem } from './errors';

type Issue = z.core.$ZodIssue;

/**
 * Every problem zod found, in words a volunteer understands, with a dotted path such as `breaks.0.from`.
 * A message that a schema wrote itself is kept.
 */
export function fieldProblems(issues: readonly Issue[]): FieldProblem[] {
  return issues.flatMap((issue): FieldProblem[] =>
    issue.code === 'unrecognized_keys'
      ? issue.keys.map((key) => ({
          path: [...issue.path.map(String), key].join('.'),
          code: issue.code,
          message: 'This field is not known here.',
        }))
      : [{ path: issue.path.map(String).join('.'), code: issue.code, message: words(issue) }],
  );
}

/** Beginnings of zod's own English messages; anything else was written for people by one of our schemas. */
const STOCK = /^(Invalid|Too|Unrecognized|Expected|Required)/;

function words(issue: Issue): string {
  if (issue.message && !STOCK.test(issue.message)) return issue.message;
  switch (issue.code) {
    case 'invalid_type':
      return issue.input === undefined
        ? 'Please fill this in.'
        : 'This has the wrong form. Please type it again.';
    case 'too_small':
      if (issue.origin === 'string')
        return Number(issue.minimum) <= 1
          ? 'Please fill this in.'
          : `At least ${issue.minimum} characters, please.`;
      if (issue.origin === 'array') return `At least ${issue.minimum} of these, please.`;
      return issue.inclusive === false
        ? `More than ${issue.minimum}, please.`
        : `At least ${issue.minimum}, please.`;
    case 'too_big':
      if (issue.origin === 'string') return `At most ${issue.maximum} characters, please.`;
      if (issue.origin === 'array') return `At most ${issue.maximum} of these, please.`;
      return `At most ${issue.maximum}, please.`;
    case 'invalid_format':
      return issue.format === 'email'
        ? 'This is no e-mail address. It looks like name@place.example.'
        : 'This has the wrong form.';
    case 'invalid_value':
      return 'Please choose one of the answers given.';
    default:
      return 'This does not fit here. Please look at it again.';
  }
}
