import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  ACTIONS,
  ALLOWED,
  ALLOWED_IN_WORKSHOP,
  Failure,
  KEY_SCOPES,
  NOBODY,
  ROLES,
  STANDINGS,
  WORKSHOP_ACTIONS,
  can,
  canInWorkshop,
  demand,
  demandInWorkshop,
  keyAllows,
  standingOf,
  type Action,
  type Actor,
  type Guarded,
  type GuardedWorkshop,
  type KeyScope,
  type Role,
  type WorkshopRole,
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

  it('lets a viewer change nothing but leave and comment', () => {
    const changes: Action[] = [
      'notebook.rename',
      'notebook.move',
      'notebook.template',
      'titleBlock.change',
      'versions.check',
      'comments.resolve',
      'revisions.issue',
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

  it('of a key is to read revisions, with that scope and while its maker holds a role', () => {
    const key = (...scopes: KeyScope[]): Actor => ({ kind: 'key', personId: 'ida', scopes });
    const held = notebook(['ida', 'owner']);
    for (const action of ACTIONS) {
      const reads = action === 'revisions.list' || action === 'revisions.read';
      expect(can(key('revisions'), action, held)).toBe(reads);
      expect(can(key('evaluate'), action, held)).toBe(false);
      expect(can(key(...KEY_SCOPES), action, notebook(['tam', 'owner']))).toBe(false);
    }
  });

  it('lets an editor issue where the workshop does, and changes nothing else', () => {
    for (const action of ACTIONS) {
      const plain = notebook(['tam', 'editor']);
      const issues = can(person('tam'), action, { ...plain, editorsIssue: true });
      expect(issues).toBe(can(person('tam'), action, plain) || action === 'revisions.issue');
      const viewer = { ...notebook(['wren', 'viewer']), editorsIssue: true };
      expect(can(person('wren'), action, viewer)).toBe(ALLOWED.viewer.has(action));
    }
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

describe('in a workshop', () => {
  const yard = (...people: [string, WorkshopRole][]): GuardedWorkshop => ({
    id: 'w1',
    members: new Map(people),
  });
  const anyDeed = fc.constantFrom(...WORKSHOP_ACTIONS);

  it('admins may all that members may, and more', () => {
    const { admin, member, none } = ALLOWED_IN_WORKSHOP;
    for (const action of member) expect(admin).toContain(action);
    expect([...admin].sort()).toEqual([...WORKSHOP_ACTIONS].sort());
    expect(admin.size).toBeGreaterThan(member.size);
    expect(none.size).toBe(0);
  });

  it('links, keys and outsiders may nothing, and outsiders learn nothing', () => {
    fc.assert(
      fc.property(anyDeed, (action) => {
        const held = yard(['ida', 'admin']);
        const key: Actor = { kind: 'key', personId: 'ida', scopes: KEY_SCOPES };
        for (const actor of [key, NOBODY, person('tam'), { kind: 'link', notebookId: 'w1' }]) {
          expect(canInWorkshop(actor as Actor, action, held)).toBe(false);
        }
        const said = [held, null].map((workshop) => {
          try {
            demandInWorkshop(person('tam'), action, workshop);
            return null;
          } catch (error) {
            return error instanceof Failure ? [error.code, error.message] : error;
          }
        });
        expect(said[0]).toEqual(said[1]);
        expect(said[0]).toEqual(['not-found', expect.any(String)]);
      }),
    );
  });

  it('a member is told in one sentence what only admins do', () => {
    for (const action of WORKSHOP_ACTIONS) {
      const attempt = () => demandInWorkshop(person('tam'), action, yard(['tam', 'member']));
      if (ALLOWED_IN_WORKSHOP.member.has(action)) expect(attempt).not.toThrow();
      else expect(attempt).toThrow(/^You are a member of this workshop; only admins .+\.$/);
    }
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
