import type { ErrorRequestHandler } from 'express';
import type { Logger } from 'pino';
import { ERROR_STATUS, type ErrorBody, type ErrorCode } from '../../shared/contracts/errors';
import { AppError } from './app-error';

interface KnownError {
  code?: string;
  type?: string;
  status?: number;
}

/** What express and its middleware throw, as one of our codes. */
function translate(error: KnownError): AppError | null {
  if (error.code === 'EBADCSRFTOKEN') {
    return new AppError(
      'EBADCSRFTOKEN',
      'This page is older than your sign-in. Load it again; nothing was changed.',
    );
  }
  if (error.type === 'entity.too.large')
    return new AppError('BODY_TOO_LARGE', 'That is too large to send. Choose a smaller file.');
  if (
    error.type === 'entity.parse.failed' ||
    (error.status !== undefined && error.status >= 400 && error.status < 500)
  ) {
    return new AppError('BODY_UNREADABLE', 'The server could not read this request. Load the page again.');
  }
  return null;
}

/** The last handler: every error leaves as the one error body; what is not foreseen is logged and ends nothing. */
export function errorHandler(log: Logger): ErrorRequestHandler {
  return (error: unknown, _req, res, next) => {
    if (res.headersSent) {
      next(error);
      return;
    }
    const requestId = String(res.getHeader('x-request-id') ?? '');
    const known = error instanceof AppError ? error : translate(error as KnownError);
    if (!known) log.error({ err: error, requestId }, 'a request failed');
    const code: ErrorCode = known?.code ?? 'INTERNAL';
    const body: ErrorBody = {
      error: {
        code,
        message:
          known?.message ??
          `Something broke on the server. Nothing was changed. Tell an organiser: ${requestId}.`,
        ...known?.more,
        requestId,
      },
    };
    res.status(ERROR_STATUS[code]).json(body);
  };
}
