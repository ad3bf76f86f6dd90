import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  ACTIONS,
  ALLOWED,
  Failure,
  KEY_SCOPES,
  NOBODY,
  ROLES,
  STANDINGS,
  can,
  demand,
  keyAllows,
  standingOf,
  type Action,
  type Actor,
  type Guarded,
  type Role,
} from '@/lib/access';

const person = (id: string): Actor => ({ kind: 'person', id });
const notebook = (...people: [string, Role][]): Guarded => ({ id: 'n1', roles: new Map(people) });

const failureOf = (actor: Actor, action: Action, guarded: Guarded | null): Failure | null => {
  try {
    demand(actor, action, guarded);
    return null;
  } catch (error) {
    if (error instanceof Failure) return error;
    throw error;
  }
};

const anyAction = fc.constantFrom(...ACTIONS);
const anyRole = fc.constantFrom(...ROLES);

describe('the table', () => {
  it('gives every role all that the role below it has, and more', () => {
    const [owner, editor, viewer] = ROLES.map((role) => ALLOWED[role]);
    for (const action of viewer ?? []) expect(editor).toContain(action);
    for (const action of editor ?? []) expect(owner).toContain(action);
    expect(owner?.size).toBeGreaterThan(editor?.size ?? 0);
    expect(editor?.size).toBeGreaterThan(viewer?.size ?? 0);
  });

  it('lets a viewer change nothing', () => {
    const changes: Action[] = [
      'notebook.rename',
      'notebook.archive',
      'versions.save',
      'versions.restore',
      'people.change',
      'links.change',
    ];
    for (const change of changes) expect(ALLOWED.viewer.has(change)).toBe(false);
  });

  it('lets a client link read and export, and no more', () => {
    expect([...ALLOWED.clientLink].sort()).toEqual(['client.export', 'client.read']);
  });

  it('gives those without a standing nothing', () => {
    expect(ALLOWED.none.size).toBe(0);
  });

  it('holds no action that nobody may do, and none that is not listed', () => {
    const given = new Set(STANDINGS.flatMap((standing) => [...ALLOWED[standing]]));
    expect([...given].sort()).toEqual([...ACTIONS].sort());
  });
});

describe('standing', () => {
  it('is what the notebook says of that person and of nobody else', () => {
    fc.assert(
      fc.property(anyRole, anyAction, (role, action) => {
        const guarded = notebook(['ida', role]);
        expect(can(person('ida'), action, guarded)).toBe(ALLOWED[role].has(action));
        expect(can(person('tam'), action, guarded)).toBe(false);
        expect(can(NOBODY, action, guarded)).toBe(false);
      }),
    );
  });

  it('of a link holds for its own notebook only', () => {
    const guarded = notebook(['ida', 'owner']);
    expect(can({ kind: 'link', notebookId: 'n1' }, 'client.read', guarded)).toBe(true);
    expect(can({ kind: 'link', notebookId: 'n2' }, 'client.read', guarded)).toBe(false);
    expect(can({ kind: 'link', notebookId: 'n1' }, 'notebook.read', guarded)).toBe(false);
  });

  it('is never had by a key, even one of an owner', () => {
    const key: Actor = { kind: 'key', personId: 'ida', scopes: KEY_SCOPES };
    for (const action of ACTIONS) expect(can(key, action, notebook(['ida', 'owner']))).toBe(false);
  });

  it('is none on a notebook that does not exist', () => {
    fc.assert(
      fc.property(anyAction, (action) => {
        expect(can(person('ida'), action, null)).toBe(false);
        expect(standingOf(person('ida'), null)).toBe('none');
      }),
    );
  });
});

describe('a refusal', () => {
  it('tells outsiders the same of a foreign notebook and of none', () => {
    fc.assert(
      fc.property(anyAction, (action) => {
        const foreign = failureOf(person('tam'), action, notebook(['ida', 'owner']));
        const unknown = failureOf(person('tam'), action, null);
        expect(foreign?.code).toBe('not-found');
        expect(foreign?.message).toBe(unknown?.message);
      }),
    );
  });

  it('tells those who may read what is missing, in one sentence', () => {
    fc.assert(
      fc.property(anyRole, anyAction, (role, action) => {
        const failure = failureOf(person('ida'), action, notebook(['ida', role]));
        if (ALLOWED[role].has(action)) {
          expect(failure).toBeNull();
        } else {
          expect(failure?.code).toBe('forbidden');
          expect(failure?.message).toMatch(/^You are an? (owner|editor|viewer) of .+\.$/);
        }
      }),
    );
  });
});

describe('the scopes of a key', () => {
  it('are all it may be used for', () => {
    for (const scope of KEY_SCOPES) {
      expect(keyAllows([scope], scope)).toBe(true);
      expect(keyAllows([], scope)).toBe(false);
    }
  });
});
