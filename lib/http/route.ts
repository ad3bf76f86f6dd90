import type { z } from 'zod';
import { Failure, keyAllows, type KeyScope } from '@/lib/access';
import {
  LIMITS,
  addressOf,
  countAgainst,
  holderOfKey,
  type KeyHolder,
  type Person,
} from '@/lib/accounts';
import { currentPerson } from '@/lib/accounts/session';
import { SMALL_BODY, check, readJson } from './body';
import { answered } from './guarded';
import { demandSameOrigin } from './origin';

/** What a route needs of a request before its handler runs; whatever is left out is not read. */
export interface RouteOptions<B extends z.ZodType, Q extends z.ZodType> {
  /** `required`: without a signed-in person the answer is 401. `none`: nobody is looked up. */
  person: 'required' | 'none';
  /** Also takes an API key with this scope as `Authorization: Bearer …`, in place of a session. */
  key?: KeyScope;
  body?: B;
  /** Most bytes the body may have; by default what no request without a notebook exceeds. */
  bodyLimit?: number;
  query?: Q;
}

/** What a handler is given: checked, typed, and with the person where one is required. */
export interface Call<Who, B, Q> {
  request: Request;
  person: Who;
  /** The id of the API key the request came with, if it came with one. */
  keyId: string | null;
  /** The person, or the key with its scopes: what a service asks that takes both. */
  asker: Who | KeyHolder;
  address: string;
  /** A part of the path by its name in the route's folder, such as `id` for `[id]`. */
  part: (name: string) => string;
  /** The same for a number that counts from 1, written as it is counted; anything else is NaN. */
  count: (name: string) => number;
  body: B;
  query: Q;
}

interface Context {
  /** Undefined for a route without parts in its path. */
  params: Promise<object | undefined>;
}

type Handler<Who, B, Q> = (call: Call<Who, B, Q>) => Promise<Response | object>;

/**
 * Makes a route handler: finds out who asks, refuses writes from other sites, reads and checks query
 * and body, runs the handler, and turns failures into problem documents and faults into silence.
 */
export function route<B extends z.ZodType = z.ZodUndefined, Q extends z.ZodType = z.ZodUndefined>(
  options: RouteOptions<B, Q> & { person: 'required' },
  handler: Handler<Person, z.output<B>, z.output<Q>>,
): (request: Request, context: Context) => Promise<Response>;
export function route<B extends z.ZodType = z.ZodUndefined, Q extends z.ZodType = z.ZodUndefined>(
  options: RouteOptions<B, Q> & { person: 'none' },
  handler: Handler<null, z.output<B>, z.output<Q>>,
): (request: Request, context: Context) => Promise<Response>;
export function route<B extends z.ZodType, Q extends z.ZodType>(
  options: RouteOptions<B, Q>,
  handler: Handler<never, z.output<B>, z.output<Q>>,
): (request: Request, context: Context) => Promise<Response> {
  return (request, context) =>
    answered(request, async () => {
      const { person, holder } = await whoAsks(request, options);
      const limit = options.bodyLimit ?? SMALL_BODY;
      const part = partsOf((await context.params) ?? {});
      const call = {
        request,
        person: person as never,
        keyId: holder?.keyId ?? null,
        asker: (holder ?? person) as never,
        address: addressOf(request.headers),
        part,
        count: (name: string) => (/^[1-9]\d{0,9}$/.test(part(name)) ? Number(part(name)) : NaN),
        query: options.query && check(options.query, queryOf(request)),
        body: options.body && check(options.body, await readJson(request, limit)),
      };
      const answer = await handler(call as Call<never, z.output<B>, z.output<Q>>);
      return answer instanceof Response ? answer : Response.json(answer);
    });
}

function partsOf(params: object): (name: string) => string {
  const parts = new Map(Object.entries(params));
  return (name) => {
    const part: unknown = parts.get(name);
    if (typeof part !== 'string') throw new TypeError(`The route's path has no part “${name}”.`);
    return part;
  };
}

interface Asking {
  person: Person | null;
  /** The key the request came with. */
  holder: KeyHolder | null;
}

/** What each scope is for, as the sentence to who lacks it ends. */
const SCOPES: Readonly<Record<KeyScope, string>> = {
  evaluate: 'evaluate',
  revisions: 'read issued revisions',
};

async function whoAsks(
  request: Request,
  options: { person: 'required' | 'none'; key?: KeyScope },
): Promise<Asking> {
  if (options.person === 'none') return { person: null, holder: null };
  const authorization = request.headers.get('authorization');
  if (options.key !== undefined && authorization !== null) {
    return whoHolds(authorization, options.key, addressOf(request.headers));
  }
  const person = await currentPerson();
  if (person === null) {
    const how =
      options.key === undefined ? '' : ', or send an API key as “Authorization: Bearer …”';
    throw new Failure('sign-in-needed', `You are not signed in. Sign in first${how}.`);
  }
  demandSameOrigin(request);
  return { person, holder: null };
}

async function whoHolds(authorization: string, scope: KeyScope, address: string): Promise<Asking> {
  const [scheme, sent, ...rest] = authorization.trim().split(/\s+/);
  const holder =
    scheme?.toLowerCase() === 'bearer' && sent !== undefined && rest.length === 0
      ? await holderOfKey(sent)
      : null;
  if (holder === null) {
    await countAgainst(LIMITS.badKey, address);
    throw new Failure(
      'bad-key',
      'This key is not known here, has expired or was revoked; expected “Bearer” and a key made in the settings.',
    );
  }
  if (!keyAllows(holder.scopes, scope)) {
    throw new Failure('forbidden', `This key may not be used to ${SCOPES[scope]}.`);
  }
  return { person: holder.person, holder };
}

/** Query parameters as an object; one that is given twice is a list, which no schema here takes. */
function queryOf(request: Request): Record<string, string | string[]> {
  const parameters = new URL(request.url).searchParams;
  const query: Record<string, string | string[]> = {};
  for (const name of new Set(parameters.keys())) {
    const values = parameters.getAll(name);
    query[name] = values.length === 1 ? (values[0] ?? '') : values;
  }
  return query;
}
