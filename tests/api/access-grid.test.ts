import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { insertMembership } from '@/db/queries/workshops';
import { ALLOWED, ROLES, type Action, type Role } from '@/lib/access';
import { doorsLeftOut, listEndpoints } from '../layout/doors';
import { openDatabase } from '../setup/server';
import { content, issue, newCast, newKey, newLink, type Cast } from './support/notebook';
import { Visitor, newcomer } from './support/visitor';

/**
 * Every endpoint of a notebook × everybody who might ask, with the expected answers worked out from
 * the access table alone.
 */
interface Endpoint {
  name: string;
  action: Action;
  method: string;
  path: (scene: Scene) => string | Promise<string>;
  body?: (scene: Scene) => unknown;
  /** Status where the table allows it; chosen so that asking twice changes nothing that matters. */
  allowed: number;
  /** Takes an API key with this scope as well; the scene's key has another one. */
  key?: 'revisions';
}

interface Scene extends Cast {
  member: Visitor;
  token: string;
  linkId: string;
  key: string;
  editorId: string;
  ownerId: string;
  workshop: string;
  /** One of comments, begun by the owner. */
  thread: string;
}

/** The id of nothing. */
const NOTHING = '00000000-0000-4000-8000-000000000000';

const base = (scene: Scene) => `/api/notebooks/${scene.notebook}`;

const endpoints: Endpoint[] = [
  { name: 'GET notebook', action: 'notebook.read', method: 'GET', path: base, allowed: 200 },
  {
    name: 'PATCH title',
    action: 'notebook.rename',
    method: 'PATCH',
    path: base,
    body: () => ({ title: 'Rose window' }),
    allowed: 204,
  },
  {
    name: 'PATCH archived',
    action: 'notebook.archive',
    method: 'PATCH',
    path: base,
    body: () => ({ archived: false }),
    allowed: 204,
  },
  {
    name: 'PATCH title block',
    action: 'titleBlock.change',
    method: 'PATCH',
    path: (scene) => `${base(scene)}/title-block`,
    body: () => ({ sheet: '1 of 3' }),
    allowed: 204,
  },
  {
    name: 'GET versions',
    action: 'versions.list',
    method: 'GET',
    path: (scene) => `${base(scene)}/versions`,
    allowed: 200,
  },
  {
    name: 'GET now',
    action: 'presence.see',
    method: 'GET',
    path: (scene) => `${base(scene)}/now?seen=1`,
    allowed: 200,
  },
  {
    name: 'GET changes',
    action: 'versions.read',
    method: 'GET',
    path: (scene) => `${base(scene)}/changes?from=1&to=1`,
    allowed: 200,
  },
  {
    name: 'POST versions to be merged',
    action: 'versions.save',
    method: 'POST',
    path: (scene) => `${base(scene)}/versions`,
    body: () => ({ base: 1, content: content('R = 1200 mm'), merge: true, byItself: true }),
    allowed: 200,
  },
  {
    name: 'POST versions',
    action: 'versions.save',
    method: 'POST',
    path: (scene) => `${base(scene)}/versions`,
    body: () => ({ base: 1, content: content('R = 1200 mm') }),
    allowed: 200,
  },
  {
    name: 'GET version',
    action: 'versions.read',
    method: 'GET',
    path: (scene) => `${base(scene)}/versions/1`,
    allowed: 200,
  },
  {
    name: 'POST restore',
    action: 'versions.restore',
    method: 'POST',
    path: (scene) => `${base(scene)}/versions/1/restore`,
    body: () => ({ base: 1 }),
    allowed: 200,
  },
  {
    name: 'GET people',
    action: 'people.list',
    method: 'GET',
    path: (scene) => `${base(scene)}/people`,
    allowed: 200,
  },
  {
    name: 'POST people',
    action: 'people.change',
    method: 'POST',
    path: (scene) => `${base(scene)}/people`,
    body: (scene) => ({ email: scene.editor.email, role: 'owner' }),
    allowed: 409,
  },
  {
    name: 'PATCH person',
    action: 'people.change',
    method: 'PATCH',
    path: (scene) => `${base(scene)}/people/${scene.editorId}`,
    body: () => ({ role: 'editor' }),
    allowed: 204,
  },
  {
    name: 'DELETE person',
    action: 'people.change',
    method: 'DELETE',
    path: (scene) => `${base(scene)}/people/${scene.ownerId}`,
    allowed: 409,
  },
  {
    name: 'POST hand over',
    action: 'people.change',
    method: 'POST',
    path: (scene) => `${base(scene)}/hand-over`,
    // To oneself, which is refused after the right was granted.
    body: (scene) => ({ to: scene.ownerId }),
    allowed: 422,
  },
  {
    name: 'GET invitations',
    action: 'people.change',
    method: 'GET',
    path: (scene) => `${base(scene)}/invitations`,
    allowed: 200,
  },
  {
    name: 'DELETE invitation',
    action: 'people.change',
    method: 'DELETE',
    path: (scene) => `${base(scene)}/invitations/${NOTHING}`,
    allowed: 404,
  },
  {
    name: 'POST letter of an invitation',
    action: 'people.change',
    method: 'POST',
    path: (scene) => `${base(scene)}/invitations/${NOTHING}/letters`,
    allowed: 404,
  },
  {
    name: 'GET logo',
    action: 'notebook.read',
    method: 'GET',
    path: (scene) => `${base(scene)}/logo/${'0'.repeat(64)}`,
    allowed: 404,
  },
  {
    name: 'GET links',
    action: 'links.list',
    method: 'GET',
    path: (scene) => `${base(scene)}/links`,
    allowed: 200,
  },
  {
    name: 'POST links',
    action: 'links.change',
    method: 'POST',
    path: (scene) => `${base(scene)}/links`,
    body: () => ({}),
    allowed: 201,
  },
  {
    name: 'DELETE link',
    action: 'links.change',
    method: 'DELETE',
    path: async (scene) =>
      `${base(scene)}/links/${(await newLink(scene.owner, scene.notebook)).id}`,
    allowed: 204,
  },
  {
    name: 'GET link',
    action: 'links.list',
    method: 'GET',
    path: (scene) => `${base(scene)}/links/${scene.linkId}`,
    allowed: 200,
  },
  {
    name: 'PATCH link',
    action: 'links.change',
    method: 'PATCH',
    path: (scene) => `${base(scene)}/links/${scene.linkId}`,
    body: () => ({ passphrase: null }),
    allowed: 204,
  },
  {
    name: 'GET checks',
    action: 'versions.list',
    method: 'GET',
    path: (scene) => `${base(scene)}/versions/1/checks`,
    allowed: 200,
  },
  {
    name: 'POST check',
    action: 'versions.check',
    method: 'POST',
    path: (scene) => `${base(scene)}/versions/1/checks`,
    body: () => ({}),
    allowed: 201,
  },
  {
    name: 'GET revisions',
    action: 'revisions.list',
    method: 'GET',
    path: (scene) => `${base(scene)}/revisions`,
    allowed: 200,
    key: 'revisions',
  },
  {
    name: 'POST revisions',
    action: 'revisions.issue',
    method: 'POST',
    path: (scene) => `${base(scene)}/revisions`,
    body: () => ({ version: 1, purpose: 'for comment' }),
    allowed: 201,
  },
  {
    name: 'GET what issuing meets',
    action: 'revisions.issue',
    method: 'GET',
    path: (scene) => `${base(scene)}/revisions/next?version=1`,
    allowed: 200,
  },
  {
    name: 'GET revision',
    action: 'revisions.read',
    method: 'GET',
    path: (scene) => `${base(scene)}/revisions/A`,
    allowed: 200,
    key: 'revisions',
  },
  {
    name: 'GET export of a revision',
    action: 'revisions.read',
    method: 'GET',
    path: (scene) => `${base(scene)}/revisions/A/export?format=csv`,
    allowed: 200,
  },
  {
    name: 'POST reevaluation',
    action: 'revisions.read',
    method: 'POST',
    path: (scene) => `${base(scene)}/revisions/A/reevaluation`,
    allowed: 200,
  },
  {
    name: 'GET export',
    action: 'notebook.export',
    method: 'GET',
    path: (scene) => `${base(scene)}/export?format=json`,
    allowed: 200,
  },
  {
    name: 'GET comments',
    action: 'comments.list',
    method: 'GET',
    path: (scene) => `${base(scene)}/comments`,
    allowed: 200,
  },
  {
    name: 'POST comment',
    action: 'comments.write',
    method: 'POST',
    path: (scene) => `${base(scene)}/comments`,
    body: () => ({ cell: 'c1', text: 'Seen.' }),
    allowed: 201,
  },
  {
    name: 'POST answer',
    action: 'comments.write',
    method: 'POST',
    path: (scene) => `${base(scene)}/comments`,
    body: ({ thread }) => ({ thread, text: 'Seen as well.' }),
    allowed: 201,
  },
  {
    name: 'PATCH resolved',
    action: 'comments.resolve',
    method: 'PATCH',
    path: (scene) => `${base(scene)}/comments/${scene.thread}`,
    body: () => ({ resolved: false }),
    allowed: 204,
  },
  {
    // One that there is not: withdrawing is the author's alone, whatever the role.
    name: 'DELETE comment',
    action: 'comments.write',
    method: 'DELETE',
    path: (scene) => `${base(scene)}/comments/${NOTHING}`,
    allowed: 404,
  },
  {
    name: 'POST duplicate',
    action: 'notebook.duplicate',
    method: 'POST',
    path: (scene) => `${base(scene)}/duplicate`,
    body: () => ({ title: 'Another sheet' }),
    allowed: 201,
  },
  {
    name: 'PATCH template',
    action: 'notebook.template',
    method: 'PATCH',
    path: (scene) => `${base(scene)}/template`,
    body: () => ({ template: false }),
    allowed: 204,
  },
  {
    // To where it is already, so that nothing changes for the others.
    name: 'POST move',
    action: 'notebook.move',
    method: 'POST',
    path: (scene) => `${base(scene)}/move`,
    body: ({ workshop }) => ({ workshopId: workshop }),
    allowed: 422,
  },
];

const SIGN_IN = [401, 'sign-in-needed'] as const;
/** Where a key is taken, whoever sends what is none, or one for something else, is told so. */
const REFUSED: Readonly<Record<string, readonly [number, string]>> = {
  'holders of a client link': [401, 'bad-key'],
  'holders of an API key': [403, 'forbidden'],
};

let scene: Scene;
const db = openDatabase();

beforeAll(async () => {
  const cast = await newCast('R = 1200 mm');
  const { owner, notebook } = cast;
  const [{ id: linkId, token }, { key }, member, people, opened] = await Promise.all([
    newLink(owner, notebook),
    newKey(owner),
    newcomer('Mab'),
    owner.get(`/api/notebooks/${notebook}/people`),
    owner.get(`/api/notebooks/${notebook}`),
  ]);
  await issue(owner, notebook);
  const begun = await owner.post(`/api/notebooks/${notebook}/comments`, {
    cell: 'c1',
    text: 'Why?',
  });
  const idOf = (email: string) =>
    (people.json.people as { id: string; email: string }[]).find((one) => one.email === email)
      ?.id ?? '';
  const { workshop } = opened.json.notebook as { workshop: { id: string } };
  const row: { id: string } = await db('users').where({ email: member.email }).first('id');
  await insertMembership(db, workshop.id, row.id, 'admin');
  scene = {
    ...cast,
    member,
    token,
    linkId,
    key,
    editorId: idOf(cast.editor.email),
    ownerId: idOf(owner.email),
    workshop: workshop.id,
    thread: String(begun.json.thread),
  };
});

afterAll(() => db.destroy());

async function ask(endpoint: Endpoint, as: Visitor, headers: Record<string, string> = {}) {
  const path = await endpoint.path(scene);
  return as.ask(endpoint.method, path, {
    headers,
    ...(endpoint.body === undefined ? {} : { body: endpoint.body(scene) }),
  });
}

/** Nobody who is turned away may learn anything of the notebook or of the people on it. */
function expectNothingLeaked(text: string): void {
  const { owner, editor, viewer } = scene;
  for (const secret of ['Rose window', '1200', owner.email, editor.email, viewer.email]) {
    expect(text).not.toContain(secret);
  }
}

describe('the grid', () => {
  it('leaves out no endpoint of a notebook', async () => {
    const doors = listEndpoints().filter(({ pattern }) =>
      pattern.startsWith('/api/notebooks/[id]'),
    );
    const requests = await Promise.all(
      endpoints.map(async ({ method, path }) => ({ method, address: await path(scene) })),
    );
    expect(doors.length).toBeGreaterThan(5);
    // Leaving takes the role away with which the next question would be asked: it has a test of its own.
    expect(doorsLeftOut(doors, requests)).toEqual(['POST /api/notebooks/[id]/leave']);
  });
});

describe('POST leave (notebook.leave)', () => {
  it('lets everybody with a role go once, except the only owner', async () => {
    const { notebook, owner, editor, viewer, stranger } = await newCast('R = 1200 mm');
    const leave = async (as: Visitor, headers: Record<string, string> = {}) => {
      const { status, json } = await as.ask('POST', `/api/notebooks/${notebook}/leave`, {
        headers,
      });
      return [status, (json as typeof json | null)?.code];
    };
    expect(await leave(new Visitor())).toEqual(SIGN_IN);
    expect(await leave(new Visitor(), { authorization: `Bearer ${scene.key}` })).toEqual(SIGN_IN);
    expect(await leave(new Visitor(), { authorization: `Bearer ${scene.token}` })).toEqual(SIGN_IN);
    expect(await leave(stranger)).toEqual([404, 'not-found']);
    const elsewhere = { origin: 'https://elsewhere.example' };
    expect(await leave(viewer, elsewhere)).toEqual([403, 'foreign-origin']);
    for (const goes of [editor, viewer]) {
      expect(await leave(goes)).toEqual([204, undefined]);
      expect(await leave(goes)).toEqual([404, 'not-found']);
    }
    expect(await leave(owner)).toEqual([409, 'last-owner']);
  });
});

describe.each(endpoints)('$name ($action)', (endpoint) => {
  it.each(ROLES.map((role) => [role]))('answers the %s as the table says', async (role: Role) => {
    const answer = await ask(endpoint, scene[role]);
    const expected = ALLOWED[role].has(endpoint.action) ? endpoint.allowed : 403;
    expect(answer.status).toBe(expected);
    if (expected === 403) {
      expect(answer.json.code).toBe('forbidden');
      expectNothingLeaked(answer.text);
    }
  });

  it.each(['member', 'stranger'] as const)(
    'says to a %s without a role what it says of an unknown notebook',
    async (who) => {
      const answer = await ask(endpoint, scene[who]);
      const unknown = { ...scene, notebook: '00000000-0000-4000-8000-000000000000' };
      const path =
        endpoint.name === 'DELETE link'
          ? `${base(unknown)}/links/${unknown.notebook}`
          : await endpoint.path(unknown);
      const other = await scene[who].ask(endpoint.method, path, {
        ...(endpoint.body === undefined ? {} : { body: endpoint.body(scene) }),
      });
      expect([answer.status, other.status]).toEqual([404, 404]);
      expect({ ...answer.json, requestId: '' }).toEqual({ ...other.json, requestId: '' });
      expectNothingLeaked(answer.text);
    },
  );

  it.each([
    ['signed-out people', () => ({})],
    ['holders of a client link', () => ({ authorization: `Bearer ${scene.token}` })],
    ['holders of an API key', () => ({ authorization: `Bearer ${scene.key}` })],
  ])('asks %s to sign in', async (who, headers) => {
    const answer = await ask(endpoint, new Visitor(), headers());
    const [status, code] = endpoint.key === undefined ? SIGN_IN : (REFUSED[who] ?? SIGN_IN);
    expect([answer.status, answer.json.code]).toEqual([status, code]);
    expectNothingLeaked(answer.text);
  });

  it('is not carried out for another site', async () => {
    const answer = await ask(endpoint, scene.owner, { origin: 'https://elsewhere.example' });
    const read = endpoint.method === 'GET';
    expect(answer.status).toBe(read ? endpoint.allowed : 403);
    if (!read) expect(answer.json.code).toBe('foreign-origin');
  });
});

describe('endpoints about oneself', () => {
  it.each([
    ['GET', '/api/notebooks', undefined],
    ['POST', '/api/notebooks', { title: 'Mine' }],
    ['GET', '/api/search?q=R', undefined],
    ['GET', '/api/templates', undefined],
    ['POST', '/api/templates/00000000-0000-4000-8000-000000000000/notebooks', { title: 'Mine' }],
    ['GET', '/api/keys', undefined],
    ['POST', '/api/keys', { label: 'Saw' }],
    ['DELETE', '/api/keys/00000000-0000-4000-8000-000000000000', undefined],
    ['DELETE', '/api/sessions', undefined],
    ['POST', '/api/evaluate', { expression: '1+1' }],
    ['POST', '/api/certificate', { cells: [], at: { cell: 'a', line: 1 } }],
  ])('%s %s needs a person', async (method, path, body) => {
    const answer = await new Visitor().ask(method, path, { body });
    expect(answer.status).toBe(401);
    expect(answer.json.code).toBe('sign-in-needed');
  });

  it.each([
    ['GET', '/api/keys', undefined],
    ['POST', '/api/keys', { label: 'Another' }],
    ['GET', '/api/notebooks', undefined],
    ['GET', '/api/search?q=R', undefined],
    ['GET', '/api/templates', undefined],
    ['DELETE', '/api/sessions', undefined],
  ])('%s %s does not take an API key for one', async (method, path, body) => {
    const headers = { authorization: `Bearer ${scene.key}` };
    const answer = await new Visitor().ask(method, path, { body, headers });
    expect(answer.status).toBe(401);
  });
});
