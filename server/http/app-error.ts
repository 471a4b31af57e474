import {
  ERROR_STATUS,
  type ErrorCode,
  type ErrorDetails,
  type FieldProblem,
} from '../../shared/contracts/errors';

/** A refusal with a code of the table; the only error that reaches a person as it is. */
export class AppError extends Error {
  readonly status: number;

  constructor(
    readonly code: ErrorCode,
    message: string,
    readonly more: { fields?: FieldProblem[]; details?: ErrorDetails } = {},
  ) {
    super(message);
    this.name = 'AppError';
    this.status = ERROR_STATUS[code];
  }
}

/** One answer for an unknown route, an unknown id, and an id of somebody else's. */
export const notFound = () => new AppError('NOT_FOUND', 'There is nothing at this address, or not for you.');

/** A wrong field found by a rule rather than by a schema. */
export const fieldError = (path: string, code: string, message: string) =>
  new AppError('VALIDATION', 'Please look at the marked field.', { fields: [{ path, code, message }] });
