import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { insertMembership } from '@/db/queries/workshops';
import {
  ALLOWED_IN_WORKSHOP,
  WORKSHOP_ACTIONS,
  WORKSHOP_ROLES,
  type WorkshopAction,
} from '@/lib/access';
import { doorsLeftOut, listEndpoints } from '../layout/doors';
import { openDatabase } from '../setup/server';
import { newKey, newLink, newNotebook } from './support/notebook';
import { Visitor, newcomer } from './support/visitor';

/**
 * Every endpoint and page of a workshop × everybody who might ask, with the expected answers worked
 * out from the access table alone.
 */
interface Endpoint {
  name: string;
  action: WorkshopAction;
  method: string;
  path: (scene: Scene) => string;
  body?: (scene: Scene) => unknown;
  /** Status where the table allows it; chosen so that asking twice changes nothing that matters. */
  allowed: number;
}

interface Scene {
  workshop: string;
  admin: Visitor;
  member: Visitor;
  stranger: Visitor;
  adminId: string;
  memberId: string;
  key: string;
  token: string;
}

/** The id of nothing. */
const NOTHING = '00000000-0000-4000-8000-000000000000';
const base = (scene: Scene) => `/api/workshops/${scene.workshop}`;

const endpoints: Endpoint[] = [
  { name: 'GET workshop', action: 'workshop.read', method: 'GET', path: base, allowed: 200 },
  {
    name: 'PATCH workshop',
    action: 'workshop.change',
    method: 'PATCH',
    path: base,
    body: () => ({ name: 'Quarrymoor Yard' }),
    allowed: 204,
  },
  {
    name: 'POST leave',
    action: 'workshop.leave',
    method: 'POST',
    path: (scene) => `${base(scene)}/leave`,
    body: () => ({}),
    // The last admin, and who alone owns a notebook, stay.
    allowed: 409,
  },
  {
    name: 'GET members',
    action: 'members.list',
    method: 'GET',
    path: (scene) => `${base(scene)}/members`,
    allowed: 200,
  },
  {
    name: 'PATCH member',
    action: 'members.change',
    method: 'PATCH',
    path: (scene) => `${base(scene)}/members/${scene.memberId}`,
    body: () => ({ role: 'member' }),
    allowed: 204,
  },
  {
    name: 'DELETE member',
    action: 'members.change',
    method: 'DELETE',
    path: (scene) => `${base(scene)}/members/${scene.adminId}`,
    allowed: 409,
  },
  {
    name: 'GET invitations',
    action: 'members.change',
    method: 'GET',
    path: (scene) => `${base(scene)}/invitations`,
    allowed: 200,
  },
  {
    name: 'POST invitations',
    action: 'members.change',
    method: 'POST',
    path: (scene) => `${base(scene)}/invitations`,
    body: (scene) => ({ email: scene.member.email, role: 'admin' }),
    allowed: 409,
  },
  {
    name: 'DELETE invitation',
    action: 'members.change',
    method: 'DELETE',
    path: (scene) => `${base(scene)}/invitations/${NOTHING}`,
    allowed: 404,
  },
  {
    name: 'POST letter of an invitation',
    action: 'members.change',
    method: 'POST',
    path: (scene) => `${base(scene)}/invitations/${NOTHING}/letters`,
    allowed: 404,
  },
  {
    name: 'PUT logo',
    action: 'workshop.change',
    method: 'PUT',
    path: (scene) => `${base(scene)}/logo`,
    body: () => '<svg xmlns="http://www.w3.org/2000/svg"/>',
    allowed: 422,
  },
  {
    name: 'DELETE logo',
    action: 'workshop.change',
    method: 'DELETE',
    path: (scene) => `${base(scene)}/logo`,
    allowed: 204,
  },
  {
    name: 'GET logo',
    action: 'workshop.read',
    method: 'GET',
    path: (scene) => `${base(scene)}/logo/${'0'.repeat(64)}`,
    allowed: 404,
  },
  {
    name: 'GET activity',
    action: 'activity.read',
    method: 'GET',
    path: (scene) => `${base(scene)}/activity?group=people`,
    allowed: 200,
  },
  {
    name: 'GET activity as CSV',
    action: 'activity.read',
    method: 'GET',
    path: (scene) => `${base(scene)}/activity/csv`,
    allowed: 200,
  },
  {
    name: 'POST notebooks',
    action: 'notebooks.create',
    method: 'POST',
    path: () => '/api/notebooks',
    body: (scene) => ({ title: 'Rose window', workshopId: scene.workshop }),
    allowed: 201,
  },
];

/** Pages, with the action that is asked for before they are drawn. */
const pages: { path: string; action: WorkshopAction }[] = [
  { path: '', action: 'workshop.read' },
  { path: '/settings', action: 'workshop.read' },
  { path: '/title-block', action: 'workshop.read' },
  { path: '/activity', action: 'activity.read' },
];

let scene: Scene;
const db = openDatabase();

beforeAll(async () => {
  const [admin, member, stranger] = await Promise.all([
    newcomer('Ada'),
    newcomer('Mab'),
    newcomer('Strand'),
  ]);
  const idOf = async ({ email }: Visitor) => {
    const row: { id: string } = await db('users').where({ email }).first('id');
    return row.id;
  };
  const [adminId, memberId] = [await idOf(admin), await idOf(member)];
  const { json } = await admin.get('/api/workshops');
  const [{ id: workshop } = { id: '' }] = json.workshops as { id: string }[];
  await insertMembership(db, workshop, memberId, 'member');
  const notebook = await newNotebook(admin, 'R = 1200 mm');
  await member.post('/api/notebooks', { title: 'Alone', workshopId: workshop });
  const [{ token }, { key }] = [await newLink(admin, notebook), await newKey(admin)];
  scene = { workshop, admin, member, stranger, adminId, memberId, key, token };
});

afterAll(() => db.destroy());

const ask = (
  endpoint: Endpoint,
  as: Visitor,
  { headers = {}, at = scene }: { headers?: Record<string, string>; at?: Scene } = {},
) =>
  as.ask(endpoint.method, endpoint.path(at), {
    headers,
    ...(endpoint.body === undefined ? {} : { body: endpoint.body(at) }),
  });

/** Nobody who is turned away may learn anything of the workshop or of its people. */
function expectNothingLeaked(text: string): void {
  for (const secret of [scene.admin.email, scene.member.email, 'Rose window', 'Alone']) {
    expect(text).not.toContain(secret);
  }
}

describe('the grid', () => {
  it('leaves out no endpoint of a workshop', () => {
    const doors = listEndpoints().filter(({ pattern }) =>
      pattern.startsWith('/api/workshops/[id]'),
    );
    const requests = endpoints.map(({ method, path }) => ({ method, address: path(scene) }));
    expect(doors.length).toBeGreaterThan(5);
    expect(doorsLeftOut(doors, requests)).toEqual([]);
  });

  it('has an endpoint for every action in a workshop', () => {
    const asked = new Set(endpoints.map(({ action }) => action));
    // These are asked over all workshops of a person at once: nobody is turned away from one.
    const overAll: WorkshopAction[] = ['templates.list', 'localMail.read'];
    const expected = WORKSHOP_ACTIONS.filter((action) => !overAll.includes(action));
    expect([...asked].sort()).toEqual([...expected].sort());
  });
});

describe.each(endpoints)('$name ($action)', (endpoint) => {
  it.each(WORKSHOP_ROLES)('answers an %s as the table says', async (role) => {
    const answer = await ask(endpoint, scene[role]);
    const isAllowed = ALLOWED_IN_WORKSHOP[role].has(endpoint.action);
    expect(answer.status).toBe(isAllowed ? endpoint.allowed : 403);
    if (!isAllowed) {
      expect(answer.json.code).toBe('forbidden');
      expectNothingLeaked(answer.text);
    }
  });

  it('says to a stranger what it says of an unknown workshop', async () => {
    const [answer, other] = [
      await ask(endpoint, scene.stranger),
      await ask(endpoint, scene.stranger, { at: { ...scene, workshop: NOTHING } }),
    ];
    expect([answer.status, other.status]).toEqual([404, 404]);
    expect({ ...answer.json, requestId: '' }).toEqual({ ...other.json, requestId: '' });
    expectNothingLeaked(answer.text);
  });

  it.each([
    ['signed-out people', () => ({})],
    ['holders of a client link', () => ({ authorization: `Bearer ${scene.token}` })],
    ['holders of an API key', () => ({ authorization: `Bearer ${scene.key}` })],
  ])('asks %s to sign in', async (_who, headers) => {
    const answer = await ask(endpoint, new Visitor(), { headers: headers() });
    expect([answer.status, answer.json.code]).toEqual([401, 'sign-in-needed']);
    expectNothingLeaked(answer.text);
  });

  it('is not carried out for another site', async () => {
    const answer = await ask(endpoint, scene.admin, {
      headers: { origin: 'https://elsewhere.example' },
    });
    const read = endpoint.method === 'GET';
    expect(answer.status).toBe(read ? endpoint.allowed : 403);
    if (!read) expect(answer.json.code).toBe('foreign-origin');
  });
});

describe.each(pages)('the page /workshops/…$path', ({ path, action }) => {
  const at = () => `/workshops/${scene.workshop}${path}`;

  it.each(WORKSHOP_ROLES)('is drawn for an %s as the table says', async (role) => {
    const answer = await scene[role].get(at());
    expect(answer.status).toBe(ALLOWED_IN_WORKSHOP[role].has(action) ? 200 : 404);
  });

  it('is not there for strangers, and signed-out people are led to sign in', async () => {
    const stranger = await scene.stranger.get(at());
    expect(stranger.status).toBe(404);
    expectNothingLeaked(stranger.text);
    const nobody = await new Visitor().get(at());
    expect(nobody.status).toBe(307);
    expect(nobody.headers.get('location')).toContain(`/sign-in?next=${encodeURIComponent(at())}`);
  });
});
