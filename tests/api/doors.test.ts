import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { insertMembership } from '@/db/queries/workshops';
import {
  ALLOWED,
  ALLOWED_IN_WORKSHOP,
  KEY_SCOPES,
  type Action,
  type KeyScope,
  type Standing,
  type WorkshopAction,
  type WorkshopStanding,
} from '@/lib/access';
import { fillIn, listEndpoints, listPages, nameOf } from '../layout/doors';
import { openDatabase } from '../setup/server';
import { issue, newCast, newKey, newLink, type Cast } from './support/notebook';
import { Visitor, newcomer } from './support/visitor';

/**
 * Every page and every method of every endpoint that is on disk × everybody who might come. A new one
 * has no place here, and a test says so, until somebody has decided who may come in.
 */
const UNKNOWN = '00000000-0000-4000-8000-000000000000';

/** Endpoints that ask for nobody: what they show is for everyone, or a secret in the address decides. */
const FOR_ANYONE: readonly string[] = [
  'GET /api/health',
  'GET /divide/chain',
  'POST /api/try',
  'POST /api/accounts',
  'POST /api/accounts/again',
  'POST /api/accounts/confirm',
  'POST /api/passwords/forgotten',
  'POST /api/passwords/reset',
  'GET /api/client/[token]/export',
  'GET /api/client/[token]/logo/[hash]',
  'POST /api/client/[token]/passphrase',
  'POST /api/invitations/[token]/account',
  'GET /api/auth/[...nextauth]',
  'POST /api/auth/[...nextauth]',
  ...['GET', 'POST', 'PUT', 'PATCH', 'DELETE'].map((method) => `${method} /api/[...unknown]`),
];

/** Endpoints that take a key as well as a session, by the scope it needs. */
const FOR_KEYS: Readonly<Record<string, KeyScope>> = {
  'POST /api/evaluate': 'evaluate',
  'POST /api/certificate': 'evaluate',
  'GET /api/notebooks/[id]/revisions': 'revisions',
  'GET /api/notebooks/[id]/revisions/[letter]': 'revisions',
};

type PageFor =
  | { for: 'anyone' }
  /** For whoever is not signed in; others are led to their notebooks. */
  | { for: 'guest' }
  /** A secret in the address decides; what an unknown one is answered with, whoever brings it. */
  | { for: 'holder'; unknown: 200 | 404 }
  | { for: 'person' }
  /** Whoever runs the copy: an admin of its oldest workshop. */
  | { for: 'operator' }
  | { for: 'notebook'; action: Action }
  | { for: 'workshop'; action: WorkshopAction };

const PAGES: Readonly<Record<string, PageFor>> = {
  '/': { for: 'anyone' },
  '/help': { for: 'anyone' },
  '/divide': { for: 'anyone' },
  '/sign-in': { for: 'guest' },
  '/sign-up': { for: 'guest' },
  '/forgot': { for: 'anyone' },
  '/confirm/[token]': { for: 'holder', unknown: 200 },
  '/reset/[token]': { for: 'holder', unknown: 200 },
  '/invitations/[token]': { for: 'holder', unknown: 404 },
  '/client/[token]': { for: 'holder', unknown: 404 },
  '/notebooks': { for: 'person' },
  '/search': { for: 'person' },
  '/settings': { for: 'person' },
  '/workshops': { for: 'person' },
  '/mail': { for: 'operator' },
  '/mail/[id]': { for: 'operator' },
  '/notebooks/[id]': { for: 'notebook', action: 'notebook.read' },
  '/notebooks/[id]/compare': { for: 'notebook', action: 'versions.read' },
  '/notebooks/[id]/revisions': { for: 'notebook', action: 'revisions.list' },
  '/notebooks/[id]/revisions/[letter]': { for: 'notebook', action: 'revisions.read' },
  '/notebooks/[id]/versions': { for: 'notebook', action: 'versions.list' },
  '/notebooks/[id]/versions/[number]': { for: 'notebook', action: 'versions.read' },
  '/workshops/[id]': { for: 'workshop', action: 'members.list' },
  '/workshops/[id]/activity': { for: 'workshop', action: 'activity.read' },
  '/workshops/[id]/settings': { for: 'workshop', action: 'workshop.read' },
  '/workshops/[id]/title-block': { for: 'workshop', action: 'workshop.read' },
};

/** What some pages have to be asked. */
const QUESTIONS: Readonly<Record<string, string>> = {
  '/search': '?q=R',
  '/notebooks/[id]/compare': '?from=1&to=1',
};

interface Scene extends Cast {
  /** Belongs to the notebook's workshop, without a role on the notebook. */
  member: Visitor;
  admin: Visitor;
  workshop: string;
  token: string;
  keys: Record<KeyScope, string>;
}

let scene: Scene;
const db = openDatabase();

beforeAll(async () => {
  const cast = await newCast('R = 1200 mm');
  const [member, admin, { token }, opened] = await Promise.all([
    newcomer('Mab'),
    newcomer('Adda'),
    newLink(cast.owner, cast.notebook),
    cast.owner.get(`/api/notebooks/${cast.notebook}`),
  ]);
  const { workshop } = opened.json.notebook as { workshop: { id: string } };
  for (const [visitor, role] of [
    [member, 'member'],
    [admin, 'admin'],
  ] as const) {
    const { id }: { id: string } = await db('users').where({ email: visitor.email }).first('id');
    await insertMembership(db, workshop.id, id, role);
  }
  const keys = Object.fromEntries(
    await Promise.all(
      KEY_SCOPES.map(async (scope) => [scope, (await newKey(cast.owner, [scope])).key] as const),
    ),
  ) as Record<KeyScope, string>;
  await issue(cast.owner, cast.notebook);
  scene = { ...cast, member, admin, workshop: workshop.id, token, keys };
});

afterAll(() => db.destroy());

describe('every endpoint', () => {
  const endpoints = listEndpoints();
  const guarded = endpoints.filter((door) => !FOR_ANYONE.includes(nameOf(door)));

  it('that is for anyone, or takes a key, exists', () => {
    const present = endpoints.map(nameOf);
    expect(
      [...FOR_ANYONE, ...Object.keys(FOR_KEYS)].filter((one) => !present.includes(one)),
    ).toEqual([]);
    expect(guarded.length).toBeGreaterThan(20);
  });

  describe.each(guarded.map((door) => [nameOf(door), door] as const))('%s', (name, door) => {
    const address = fillIn(door.pattern, UNKNOWN);
    const ask = (as: Visitor, headers: Record<string, string> = {}) =>
      as.ask(door.method, address, { headers, ...(door.method === 'GET' ? {} : { body: {} }) });

    it('asks signed-out people and holders of a client link to sign in', async () => {
      const ways: Record<string, string>[] = [{}, { authorization: `Bearer ${scene.token}` }];
      for (const headers of ways) {
        const { status, json } = await ask(new Visitor(), headers);
        const code =
          FOR_KEYS[name] !== undefined && 'authorization' in headers ? 'bad-key' : 'sign-in-needed';
        expect([status, json.code]).toEqual([401, code]);
      }
    });

    it.each(KEY_SCOPES)('takes a key for %s only if that is its scope', async (scope) => {
      const { status, json } = await ask(new Visitor(), {
        authorization: `Bearer ${scene.keys[scope]}`,
      });
      const needed = FOR_KEYS[name];
      if (needed === undefined) expect([status, json.code]).toEqual([401, 'sign-in-needed']);
      else if (needed !== scope) expect([status, json.code]).toEqual([403, 'forbidden']);
      else expect([401, 403]).not.toContain(status);
    });
  });
});

describe('every page', () => {
  const pages = listPages();

  it('has been decided about', () => {
    expect(Object.keys(PAGES).sort()).toEqual(pages);
  });

  const comers: { who: string; notebook: Standing; workshop: WorkshopStanding }[] = [
    // Whoever makes a notebook in a workshop of their own is its admin.
    { who: 'owner', notebook: 'owner', workshop: 'admin' },
    { who: 'editor', notebook: 'editor', workshop: 'none' },
    { who: 'viewer', notebook: 'viewer', workshop: 'none' },
    { who: 'admin', notebook: 'none', workshop: 'admin' },
    { who: 'member', notebook: 'none', workshop: 'member' },
    { who: 'stranger', notebook: 'none', workshop: 'none' },
  ];
  const visitor = (who: string) => scene[who as 'owner' | 'member'];
  const addressOf = (pattern: string) =>
    fillIn(
      pattern
        .replace('[id]', pattern.startsWith('/workshops') ? scene.workshop : scene.notebook)
        .replace('[letter]', 'A'),
      '1',
    ) + (QUESTIONS[pattern] ?? '');

  describe.each(Object.entries(PAGES))('%s', (pattern, page) => {
    it.each(comers)('is open to the $who as the tables say', async (comer) => {
      const answer = await visitor(comer.who).get(addressOf(pattern));
      const open =
        page.for === 'anyone' ||
        page.for === 'person' ||
        (page.for === 'notebook' && ALLOWED[comer.notebook].has(page.action)) ||
        (page.for === 'workshop' && ALLOWED_IN_WORKSHOP[comer.workshop].has(page.action));
      const closed = page.for === 'holder' ? page.unknown : page.for === 'guest' ? 307 : 404;
      expect(answer.status).toBe(open ? 200 : closed);
      if (!open) {
        for (const secret of ['Rose window', '1200', scene.owner.email, scene.editor.email]) {
          expect(answer.text).not.toContain(secret);
        }
      }
    });

    it('sends signed-out people to sign in, or lets them in, as was decided', async () => {
      const answer = await new Visitor().get(addressOf(pattern));
      const guarded = !['anyone', 'guest', 'holder'].includes(page.for);
      const unguarded = page.for === 'holder' ? page.unknown : 200;
      expect(answer.status).toBe(guarded ? 307 : unguarded);
      if (answer.status !== 307) return;
      const { pathname, searchParams } = new URL(answer.headers.get('location') ?? '', 'http://x');
      expect([pathname, searchParams.get('next')]).toEqual(['/sign-in', addressOf(pattern)]);
    });
  });
});
