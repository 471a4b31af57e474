import { newId } from '../../../shared/kernel/ids';

/** A refusal of the server, by its code. */
export class DemoRefusal extends Error {
  constructor(
    readonly code: string,
    message: string,
  ) {
    super(`${code}: ${message}`);
  }
}

interface Body {
  data?: unknown;
  error?: { code: string; message: string; fields?: { path: string; message: string }[] };
}

/** One person's browser in the demo: everything is made over the same routes as real data. */
export class DemoClient {
  private cookie = '';
  private token: string | null = null;

  constructor(private readonly url: string) {}

  get<T>(path: string): Promise<T> {
    return this.exchange<T>('GET', path);
  }

  async send<T>(method: 'POST' | 'PUT' | 'DELETE', path: string, body: object = {}): Promise<T> {
    this.token ??= (await this.get<{ csrfToken: string }>('/session')).csrfToken;
    return this.exchange<T>(method, path, body);
  }

  post<T>(path: string, body: object = {}): Promise<T> {
    return this.send<T>('POST', path, body);
  }

  private async exchange<T>(method: string, path: string, body?: object): Promise<T> {
    const response = await fetch(`${this.url}/api${path}`, {
      method,
      headers: {
        ...(this.cookie ? { cookie: this.cookie } : {}),
        ...(body
          ? {
              'content-type': 'application/json',
              'x-csrf-token': this.token ?? '',
              'idempotency-key': newId(),
            }
          : {}),
      },
      ...(body ? { body: JSON.stringify(body) } : {}),
    });
    const [cookie] = response.headers.getSetCookie();
    if (cookie) {
      this.cookie = cookie.split(';')[0] ?? '';
      // A sign-in begins a session with a token of its own.
      this.token = null;
    }
    const answer = (await response.json()) as Body;
    if (answer.error) {
      const fields = (answer.error.fields ?? []).map(({ path: at, message }) => `${at}: ${message}`);
      throw new DemoRefusal(answer.error.code, [answer.error.message, ...fields].join(' '));
    }
    return answer.data as T;
  }
}
