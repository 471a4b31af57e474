import type { ErrorBody, ErrorCode, ErrorDetails, FieldProblem } from '../../shared/contracts/errors';
import type { SessionView } from '../../shared/contracts/live';
import { newId } from '../../shared/kernel/ids';

/** The server's refusal: a code to act on, words to show, fields to mark. */
export class ApiError extends Error {
  constructor(
    readonly code: ErrorCode,
    message: string,
    readonly status: number,
    readonly fields: FieldProblem[],
    readonly details: ErrorDetails,
    readonly requestId: string,
  ) {
    super(message);
    this.name = 'ApiError';
  }
}

/** The request never reached the server, or its answer never came back. */
export class NetworkError extends Error {
  constructor(cause: unknown) {
    super('There is no network, or the server does not answer.', { cause });
    this.name = 'NetworkError';
  }
}

export type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

/** How long an answer may take before the network counts as gone. */
const TIMEOUT_MS = 15_000;

let csrfToken: string | null = null;

/** Who is signed in; also fetches the token that every change carries. */
export async function fetchSession(): Promise<SessionView> {
  const view = await exchange<SessionView>('GET', '/session', undefined, {});
  csrfToken = view.csrfToken;
  return view;
}

/** The token changes with every sign-in and sign-out. */
export function forgetToken(): void {
  csrfToken = null;
}

/** Read something. */
export const get = <T>(path: string): Promise<T> => exchange<T>('GET', path, undefined, {});

/**
 * Change something, once however often it is sent: the same key has the same answer.
 * @param path below `/api`
 * @param key made anew for every wish of a person, kept for every repetition of it
 * @throws ApiError for a refusal, NetworkError when no answer came
 */
export async function send<T>(
  method: Exclude<Method, 'GET'>,
  path: string,
  body: object = {},
  key: string = newId(),
): Promise<T> {
  if (csrfToken === null) await fetchSession();
  try {
    return await exchange<T>(method, path, body, headersOf(key));
  } catch (error) {
    // The page is older than its sign-in: renew the token and try this very request once more.
    if (!(error instanceof ApiError) || error.code !== 'EBADCSRFTOKEN') throw error;
    await fetchSession();
    return exchange<T>(method, path, body, headersOf(key));
  }
}

const headersOf = (key: string): Record<string, string> => ({
  'x-csrf-token': csrfToken ?? '',
  'idempotency-key': key,
});

async function exchange<T>(
  method: Method,
  path: string,
  body: object | undefined,
  headers: Record<string, string>,
): Promise<T> {
  let response: Response;
  try {
    response = await fetch(`/api${path}`, {
      method,
      credentials: 'same-origin',
      headers: {
        accept: 'application/json',
        ...(body ? { 'content-type': 'application/json' } : {}),
        ...headers,
      },
      signal: AbortSignal.timeout(TIMEOUT_MS),
      ...(body ? { body: JSON.stringify(body) } : {}),
    });
  } catch (cause) {
    throw new NetworkError(cause);
  }
  const answer = await readBody(response);
  if (response.ok && answer && 'data' in answer) return answer.data as T;
  const error = answer && 'error' in answer ? answer.error : null;
  // A proxy or a half-dead server answers with something that is none of ours.
  if (!error) throw new NetworkError(new Error(`status ${response.status}`));
  throw new ApiError(
    error.code,
    error.message,
    response.status,
    error.fields ?? [],
    error.details ?? {},
    error.requestId,
  );
}

async function readBody(response: Response): Promise<{ data: unknown } | ErrorBody | null> {
  try {
    return (await response.json()) as { data: unknown } | ErrorBody;
  } catch {
    return null;
  }
}
