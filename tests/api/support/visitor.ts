import { randomBytes, randomInt } from 'node:crypto';
import { letterTo, linkIn } from '../../setup/letters';
import { baseUrl } from '../../setup/server';

export const PASSWORD = 'trammel and straightedge';

export interface Answer {
  status: number;
  headers: Headers;
  /** The body as it came. */
  text: string;
  /** The body read as JSON; null when there is none. */
  json: Record<string, unknown>;
}

export interface Asked {
  body?: unknown;
  headers?: Record<string, string>;
}

/** One browser, or one script: a cookie jar of its own, and a network address of its own. */
export class Visitor {
  readonly cookies = new Map<string, string>();
  /** Limits are counted per address, so every visitor comes from another one. */
  readonly address = `198.18.${randomInt(256)}.${randomInt(256)}`;
  name = 'nobody';
  email = '';
  /** What the browser says it is, if anything. */
  userAgent = '';

  /** Sends a request as a page of the site would. */
  async ask(method: string, path: string, { body, headers = {} }: Asked = {}): Promise<Answer> {
    const response = await fetch(new URL(path, baseUrl()), {
      method,
      redirect: 'manual',
      headers: {
        origin: new URL(baseUrl()).origin,
        'x-forwarded-for': this.address,
        ...(this.userAgent === '' ? {} : { 'user-agent': this.userAgent }),
        ...(this.cookies.size === 0 ? {} : { cookie: this.cookieHeader() }),
        ...(body === undefined ? {} : { 'content-type': 'application/json' }),
        ...headers,
      },
      ...(body === undefined
        ? {}
        : {
            body:
              typeof body === 'string' || body instanceof Uint8Array
                ? (body as BodyInit)
                : JSON.stringify(body),
          }),
    });
    for (const line of response.headers.getSetCookie()) this.keepCookie(line);
    const text = await response.text();
    const isJson = response.headers.get('content-type')?.includes('json') === true;
    const json = (isJson ? JSON.parse(text) : null) as Record<string, unknown>;
    return { status: response.status, headers: response.headers, text, json };
  }

  get(path: string, headers?: Record<string, string>): Promise<Answer> {
    return this.ask('GET', path, headers === undefined ? {} : { headers });
  }

  post(path: string, body: unknown, headers?: Record<string, string>): Promise<Answer> {
    return this.ask('POST', path, { body, ...(headers === undefined ? {} : { headers }) });
  }

  /** Signs in over HTTP, as next-auth's own client does. */
  async signIn(email: string, password: string = PASSWORD): Promise<Answer> {
    const { json } = await this.get('/api/auth/csrf');
    const form = new URLSearchParams({
      csrfToken: String(json.csrfToken),
      email,
      password,
      json: 'true',
    });
    return this.ask('POST', '/api/auth/callback/credentials', {
      body: form.toString(),
      headers: { 'content-type': 'application/x-www-form-urlencoded' },
    });
  }

  get session(): string | undefined {
    return this.cookies.get('next-auth.session-token');
  }

  private cookieHeader(): string {
    return [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; ');
  }

  private keepCookie(line: string): void {
    const [pair = ''] = line.split(';');
    const at = pair.indexOf('=');
    const value = pair.slice(at + 1);
    if (value === '') this.cookies.delete(pair.slice(0, at));
    else this.cookies.set(pair.slice(0, at), value);
  }
}

/** An address nobody else in this run has. */
export function freshEmail(name: string): string {
  return `${name.toLowerCase()}.${randomBytes(5).toString('hex')}@quarrymoor.example`;
}

/** Asks for an account over HTTP and gives the confirmation link's token, read from the letter. */
export async function signUpAndRead(visitor: Visitor, name: string): Promise<string> {
  const asked = await visitor.post('/api/accounts', {
    name,
    email: visitor.email,
    password: PASSWORD,
    workshop: 'Quarrymoor Yard',
  });
  if (asked.status !== 202) throw new Error(`No account: ${asked.text}`);
  const letter = await letterTo(visitor.email, { subject: 'Confirm your e-mail address' });
  return tokenIn(linkIn(letter.text));
}

/** The secret at the end of a link. */
export const tokenIn = (link: string) => new URL(link).pathname.split('/').at(-1) ?? '';

/** Somebody with a confirmed account and a workshop, signed in. */
export async function newcomer(name: string): Promise<Visitor> {
  const visitor = new Visitor();
  visitor.name = name;
  visitor.email = freshEmail(name);
  const token = await signUpAndRead(visitor, name);
  const made = await visitor.post('/api/accounts/confirm', { token });
  if (made.status !== 201) throw new Error(`Not confirmed: ${made.text}`);
  await visitor.signIn(visitor.email);
  if (visitor.session === undefined) throw new Error('No session after signing in.');
  return visitor;
}
