export interface TestAnswer<Body> {
  readonly status: number;
  readonly headers: Headers;
  readonly body: Body;
  readonly text: string;
}

/** Password of everybody the factories make. */
export const testPassword = 'plain sailing past Quillhaven';

/** A browser without a screen: keeps cookies, and sends the XSRF token as Angular does. */
export class TestClient {
  private readonly cookies = new Map<string, string>();

  constructor(private readonly origin: string) {}

  async signIn(email: string, password: string = testPassword): Promise<this> {
    await this.get('/api/session');
    const answer = await this.send('POST', '/api/session', { email, password });
    // No runner's assertion: the browser tests build their data with this client, too.
    if (answer.status !== 200) throw new Error(`sign-in of ${email}: ${answer.text}`);
    return this;
  }

  get<Body = unknown>(path: string, headers: Record<string, string> = {}):
  Promise<TestAnswer<Body>> {
    return this.send('GET', path, undefined, headers);
  }

  post<Body = unknown>(path: string, body?: unknown): Promise<TestAnswer<Body>> {
    return this.send('POST', path, body);
  }

  put<Body = unknown>(path: string, body?: unknown): Promise<TestAnswer<Body>> {
    return this.send('PUT', path, body);
  }

  patch<Body = unknown>(path: string, body?: unknown): Promise<TestAnswer<Body>> {
    return this.send('PATCH', path, body);
  }

  delete<Body = unknown>(path: string): Promise<TestAnswer<Body>> {
    return this.send('DELETE', path);
  }

  /** Any body that fetch takes goes as it is; anything else as JSON. */
  async send<Body = unknown>(
    method: string, path: string, body?: unknown, headers: Record<string, string> = {},
  ): Promise<TestAnswer<Body>> {
    const isRaw = typeof body === 'string' || body instanceof FormData
      || body instanceof URLSearchParams || body instanceof Uint8Array;
    const token = this.cookies.get('XSRF-TOKEN');
    const response = await fetch(this.origin + path, {
      method,
      redirect: 'manual',
      headers: {
        ...(this.cookies.size ? { Cookie: this.cookieHeader() } : {}),
        ...(method !== 'GET' && token ? { 'X-XSRF-TOKEN': token } : {}),
        ...(body !== undefined && !isRaw ? { 'Content-Type': 'application/json' } : {}),
        ...headers,
      },
      ...(body === undefined ? {} : { body: isRaw ? body as BodyInit : JSON.stringify(body) }),
    });
    this.keepCookies(response.headers);
    const text = await response.text();
    const isJson = /json/.test(response.headers.get('content-type') ?? '');
    return { status: response.status, headers: response.headers, text,
      body: (isJson && text ? JSON.parse(text) : text) as Body };
  }

  /** The bytes of a file. */
  async download(path: string): Promise<{ status: number; headers: Headers; bytes: Buffer }> {
    const response = await fetch(this.origin + path,
      { headers: this.cookies.size ? { Cookie: this.cookieHeader() } : {} });
    return { status: response.status, headers: response.headers,
      bytes: Buffer.from(await response.arrayBuffer()) };
  }

  forgetCookie(name: string): void {
    this.cookies.delete(name);
  }

  cookieHeader(): string {
    return [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; ');
  }

  private keepCookies(headers: Headers): void {
    for (const cookie of headers.getSetCookie()) {
      const [pair = ''] = cookie.split(';');
      const at = pair.indexOf('=');
      const name = pair.slice(0, at);
      if (/expires=Thu, 01 Jan 1970/i.test(cookie)) this.cookies.delete(name);
      else this.cookies.set(name, pair.slice(at + 1));
    }
  }
}
