/** A program that knows only the interface's description: signs in and calls it as a browser or a script would. */
export type Body = Record<string, unknown>;
export interface Answer {
  status: number;
  headers: Headers;
  body: Body;
}

/** A list inside a body. */
export function listOf(body: Body, key = 'items'): Body[] {
  const list = body[key];
  if (!Array.isArray(list)) throw new Error(`${key} is no list: ${JSON.stringify(body)}`);
  return list as Body[];
}

export class OutsideApi {
  private cookie = '';
  constructor(readonly url: string) {}

  static async signIn(url: string, email: string, password: string): Promise<OutsideApi> {
    const api = new OutsideApi(url);
    const response = await fetch(`${url}/api/auth/sign-in/email`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', origin: url },
      body: JSON.stringify({ email, password }),
    });
    if (response.status !== 200)
      throw new Error(`sign-in answered ${response.status}: ${await response.text()}`);
    api.cookie = response.headers
      .getSetCookie()
      .map((line) => line.split(';')[0])
      .join('; ');
    return api;
  }

  async call(
    method: string,
    path: string,
    body?: unknown,
    headers: Record<string, string> = {},
  ): Promise<Answer> {
    const response = await fetch(`${this.url}/api/v1${path}`, {
      method,
      headers: {
        cookie: this.cookie,
        origin: this.url,
        ...(body === undefined ? {} : { 'content-type': 'application/json' }),
        ...headers,
      },
      ...(body === undefined ? {} : { body: typeof body === 'string' ? body : JSON.stringify(body) }),
    });
    const text = await response.text();
    const json = /json/.test(response.headers.get('content-type') ?? '');
    return {
      status: response.status,
      headers: response.headers,
      body: (json ? JSON.parse(text) : { text }) as Body,
    };
  }

  /** A page as a browser first gets it. */
  async page(path: string): Promise<string> {
    return (await fetch(`${this.url}${path}`, { headers: { cookie: this.cookie } })).text();
  }

  get(path: string): Promise<Answer> {
    return this.call('GET', path);
  }

  /** POST that must succeed; answers the body. */
  async make(path: string, body: unknown): Promise<Body> {
    const answer = await this.call('POST', path, body);
    if (answer.status !== 201 && answer.status !== 200) {
      throw new Error(`POST ${path} answered ${answer.status}: ${JSON.stringify(answer.body)}`);
    }
    return answer.body;
  }
}
