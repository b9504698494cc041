import request, { type Response } from 'supertest';

/** What comes back from /graphql. */
export interface Answer<Data = Record<string, unknown>> {
  status: number;
  data: Data | null;
  errors: { message: string; extensions?: { code?: string } }[];
  /** The codes of the errors. */
  codes: string[];
}

/** Someone who calls the API over HTTP: a browser with its cookie, or a program with its bearer. */
export class Caller {
  private cookie: string | null = null;
  bearer: string | null = null;

  constructor(
    private readonly url: string,
    private readonly address: string,
  ) {}

  /** The session's token, null when there is none. */
  get session(): string | null {
    return this.cookie?.replace(/^[^=]*=/, '') || null;
  }

  get cookieHeader(): string | null {
    return this.cookie;
  }

  /** Another one at the same address who has the same session. */
  twin(): Caller {
    const twin = new Caller(this.url, this.address);
    twin.cookie = this.cookie;
    twin.bearer = this.bearer;
    return twin;
  }

  /** The same one, calling another server. */
  at(url: string): Caller {
    const there = new Caller(url, this.address);
    there.cookie = this.cookie;
    there.bearer = this.bearer;
    return there;
  }

  /** Sends a body as it is and keeps the cookie that comes back. */
  async post(body: string | object, headers: Record<string, string> = {}): Promise<Response> {
    const response = await request(this.url)
      .post('/graphql')
      .set({
        'Content-Type': 'application/json',
        Accept: 'application/graphql-response+json',
        'X-Forwarded-For': this.address,
        ...(this.cookie && { Cookie: this.cookie }),
        ...(this.bearer && { Authorization: `Bearer ${this.bearer}` }),
        ...headers,
      })
      .send(body);
    const set = (response.headers['set-cookie'] as unknown as string[] | undefined)?.[0];
    if (set !== undefined) {
      const [pair = ''] = set.split(';');
      this.cookie = pair.endsWith('=') ? null : pair;
    }
    return response;
  }

  /** Asks, whatever comes of it. */
  async ask<Data = Record<string, unknown>>(
    query: string,
    variables: Record<string, unknown> = {},
    headers: Record<string, string> = {},
  ): Promise<Answer<Data>> {
    const response = await this.post({ query, variables }, headers);
    const body = response.body as { data?: Data | null; errors?: Answer['errors'] };
    const errors = body.errors ?? [];
    return {
      status: response.status,
      data: body.data ?? null,
      errors,
      codes: errors.map((error) => error.extensions?.code ?? error.message),
    };
  }

  /** Asks what must work: an error fails the test. */
  async get<Data = Record<string, never>>(
    query: string,
    variables: Record<string, unknown> = {},
  ): Promise<Data> {
    const { data, errors } = await this.ask<Data>(query, variables);
    if (errors.length > 0 || data === null) {
      throw new Error(`${query}: ${JSON.stringify(errors)}`);
    }
    return data;
  }
}
