import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import { insertClientLink, listClientLinkOpenings } from '@/db/queries/client-links';
import { Failure } from '@/lib/access';
import { hashOf, newSecret } from '@/lib/accounts';
import { closePool } from '@/lib/evaluation';
import {
  IssueRequest,
  LinkRequest,
  changeLink,
  countOpening,
  createLink,
  exportByToken,
  issueRevision,
  listLinks,
  readByToken,
  readLink,
  revokeLink,
  tryPassphrase,
} from '@/lib/notebooks';
import { isPass, makePass, tokenOf } from '@/lib/notebooks/link-tokens';
import { addVersion, contentOf, newScene, type Scene } from './support/scene';

afterAll(closePool);
afterAll(closeDatabase);

const request = (more: object = {}) => LinkRequest.parse({ label: 'The architect', ...more });
const issue = (scene: Scene, version = 1, more: object = {}) =>
  issueRevision(
    scene.owner,
    scene.notebook,
    IssueRequest.parse({ version, purpose: 'for comment', ...more }),
  );

async function codeOf(work: Promise<unknown>): Promise<string> {
  const fault: unknown = await work.then(
    () => null,
    (error: unknown) => error,
  );
  return fault instanceof Failure ? fault.code : String(fault);
}

const letterFor = async (token: string) => {
  const view = await readByToken(token, undefined);
  return view.kind === 'revision' ? view.open.revision.letter : view.kind;
};

/** The letters to this address that wait in the queue. */
async function lettersTo(email: string): Promise<Record<string, unknown>[]> {
  const rows = (await database()('outgoing_mail').where({ recipient: email })) as {
    letter: string;
  }[];
  return rows.map(({ letter }) => JSON.parse(letter) as Record<string, unknown>);
}

describe('a link to the latest', () => {
  it('shows nothing until something is issued, and then always the newest', async () => {
    const scene = await newScene();
    const { token } = await createLink(scene.owner, scene.notebook, request());
    expect(await letterFor(token)).toBe('nothing-issued');
    expect(await codeOf(exportByToken(token, undefined))).toBe('nothing-issued');
    await issue(scene);
    expect(await letterFor(token)).toBe('A');
    await addVersion(scene, 2, scene.owner, contentOf('R = 1150 mm'));
    expect(await letterFor(token)).toBe('A');
    await issue(scene, 2);
    expect(await letterFor(token)).toBe('B');
  });

  it('of before there were revisions keeps its token and shows the latest', async () => {
    const scene = await newScene();
    const token = newSecret();
    const id = await insertClientLink(database(), {
      notebookId: scene.notebook,
      tokenHash: hashOf(token),
      label: 'Old',
      createdBy: scene.owner.id,
    });
    await issue(scene);
    expect(await letterFor(token)).toBe('A');
    expect((await readLink(scene.owner, scene.notebook, id)).url).toBeNull();
  });
});

describe('a link to one revision', () => {
  it('stays there, and says when a newer one is out', async () => {
    const scene = await newScene();
    await issue(scene);
    const { token } = await createLink(scene.owner, scene.notebook, request({ revision: 'A' }));
    await issue(scene);
    const view = await readByToken(token, undefined);
    expect(view).toMatchObject({
      kind: 'revision',
      open: { revision: { letter: 'A', supersededBy: 'B' } },
    });
  });

  it('is not made to one that the notebook has not', async () => {
    const { owner, notebook } = await newScene();
    expect(await codeOf(createLink(owner, notebook, request({ revision: 'A' })))).toBe('invalid');
  });
});

describe('the address', () => {
  it('is shown again to owners, though only a hash of the token is stored', async () => {
    const { owner, editor, notebook } = await newScene();
    const { id, token, url } = await createLink(owner, notebook, request());
    expect(token).toMatch(/^[A-Za-z0-9_-]{43}$/);
    expect((await readLink(owner, notebook, id)).url).toBe(url);
    const row: unknown = await database()('client_links').where({ id }).first();
    expect(JSON.stringify(row)).not.toContain(token);
    expect(JSON.stringify(await listLinks(owner, notebook))).not.toContain(token);
    expect(await codeOf(readLink(editor, notebook, id))).toBe('forbidden');
  });

  it('is not made again once the secret was changed, though the link goes on working', async () => {
    const scene = await newScene();
    const { owner, notebook } = scene;
    const { id } = await createLink(owner, notebook, request());
    await issue(scene);
    // What a change of the secret comes to: the stored hash is that of another token.
    const token = newSecret();
    await database()('client_links')
      .where({ id })
      .update({ token_hash: hashOf(token) });
    expect((await readLink(owner, notebook, id)).url).toBeNull();
    expect(await letterFor(token)).toBe('A');
    expect(await codeOf(readByToken(tokenOf(id), undefined))).toBe('not-found');
  });
});

describe('an end', () => {
  it('comes at once when the link is revoked, and looks like a link that never was', async () => {
    const scene = await newScene();
    const { owner, notebook } = scene;
    await issue(scene);
    const { id, token } = await createLink(owner, notebook, request());
    expect(await letterFor(token)).toBe('A');
    await revokeLink(owner, notebook, id);
    const say = async (sent: string) =>
      readByToken(sent, undefined).catch((fault: unknown) => (fault as Failure).message);
    expect(await say(token)).toBe(await say('A'.repeat(43)));
    expect(await codeOf(exportByToken(token, undefined))).toBe('not-found');
    expect(await codeOf(revokeLink(owner, notebook, id))).toBe('not-found');
    expect((await readLink(owner, notebook, id)).url).toBeNull();
  });

  it('comes with the last day, and the holder is told', async () => {
    const scene = await newScene();
    const { owner, notebook } = scene;
    await issue(scene);
    const today = new Date().toISOString().slice(0, 10);
    const { id, token } = await createLink(owner, notebook, request({ lastDay: today }));
    expect(await letterFor(token)).toBe('A');
    await database()('client_links')
      .where({ id })
      .update({ expires_at: new Date(Date.now() - 1000) });
    expect(await letterFor(token)).toBe('expired');
    expect(await codeOf(exportByToken(token, undefined))).toBe('link-expired');
    expect(await codeOf(createLink(owner, notebook, request({ lastDay: '2020-02-29' })))).toBe(
      'invalid',
    );
  });
});

describe('a passphrase', () => {
  let scene: Scene;
  let link: { id: string; token: string };
  beforeAll(async () => {
    scene = await newScene();
    await issue(scene);
    link = await createLink(scene.owner, scene.notebook, request({ passphrase: 'lime and sand' }));
  });

  it('is asked for before anything is shown or exported', async () => {
    expect(await readByToken(link.token, undefined)).toEqual({
      kind: 'passphrase',
      linkId: link.id,
    });
    expect(await codeOf(exportByToken(link.token, undefined))).toBe('passphrase-needed');
    for (const forged of ['', '1.x', `9999999999.${'A'.repeat(43)}`]) {
      expect((await readByToken(link.token, forged)).kind).toBe('passphrase');
    }
  });

  it('opens this link, for some hours, until it is changed', async () => {
    expect(await tryPassphrase(link.token, 'lime and salt', 'a')).toBeNull();
    const pass = (await tryPassphrase(link.token, 'lime and sand', 'a')) ?? '';
    expect((await readByToken(link.token, pass)).kind).toBe('revision');
    const other = await createLink(
      scene.owner,
      scene.notebook,
      request({ passphrase: 'lime and sand' }),
    );
    expect((await readByToken(other.token, pass)).kind).toBe('passphrase');
    await changeLink(scene.owner, scene.notebook, link.id, { passphrase: 'sand and lime' });
    expect((await readByToken(link.token, pass)).kind).toBe('passphrase');
    const fresh = (await tryPassphrase(link.token, 'sand and lime', 'a')) ?? '';
    expect((await readByToken(link.token, fresh)).kind).toBe('revision');
    await changeLink(scene.owner, scene.notebook, link.id, { passphrase: null });
    expect((await readByToken(link.token, undefined)).kind).toBe('revision');
  });

  it('is forgotten by the browser’s pass when its time is over', () => {
    const locked = { id: 'x', passphraseHash: 'h' };
    const pass = makePass(locked, 0);
    expect(isPass(locked, pass, 3600 * 1000)).toBe(true);
    expect(isPass(locked, pass, 13 * 3600 * 1000)).toBe(false);
    expect(isPass({ ...locked, passphraseHash: 'i' }, pass, 0)).toBe(false);
    expect(isPass({ ...locked, id: 'y' }, pass, 0)).toBe(false);
  });

  it('is tried so many times from one address and no more, and its hash is not the passphrase', async () => {
    const { token, id } = await createLink(
      scene.owner,
      scene.notebook,
      request({ passphrase: 'lime and sand' }),
    );
    const codes: string[] = [];
    for (let attempt = 0; attempt < 12; attempt += 1) {
      codes.push(await codeOf(tryPassphrase(token, 'wrong wrong', 'one')));
    }
    expect(codes.at(0)).toBe('null');
    expect(codes.at(-1)).toBe('too-many');
    expect(await codeOf(tryPassphrase(token, 'lime and sand', 'one'))).toBe('too-many');
    expect(await tryPassphrase(token, 'lime and sand', 'another')).not.toBeNull();
    const row = (await database()('client_links').where({ id }).first()) as {
      passphrase_hash: string;
    };
    expect(row.passphrase_hash).toMatch(/^\$argon2id\$/);
  });
});

describe('openings', () => {
  it('are counted, and of the last ones the time is kept and nothing else', async () => {
    const { owner, notebook } = await newScene();
    const { id } = await createLink(owner, notebook, request());
    for (let opening = 0; opening < 205; opening += 1) await countOpening(id);
    expect(await listLinks(owner, notebook)).toMatchObject([{ id, opened: 205 }]);
    expect(await listClientLinkOpenings(database(), id, 1000)).toHaveLength(200);
    const row = (await database()('client_link_openings').where({ link_id: id }).first()) as object;
    expect(Object.keys(row).sort()).toEqual(['link_id', 'number', 'opened_at']);
    expect((await readLink(owner, notebook, id)).openings.length).toBeGreaterThan(10);
  });
});

describe('the letter about a new revision', () => {
  it('goes once to the client of every live link to the latest, with the address, and to no other', async () => {
    const scene = await newScene();
    const { owner, notebook } = scene;
    const mail = (name: string) => `${name}.${notebook}@olvane.example`;
    await issue(scene);
    const told = await createLink(
      owner,
      notebook,
      request({
        clientName: 'The Trustees',
        clientEmail: mail('told'),
        passphrase: 'lime and sand',
      }),
    );
    await createLink(owner, notebook, request({ clientEmail: mail('fixed'), revision: 'A' }));
    const revoked = await createLink(owner, notebook, request({ clientEmail: mail('revoked') }));
    await revokeLink(owner, notebook, revoked.id);
    const over = await createLink(owner, notebook, request({ clientEmail: mail('over') }));
    await database()('client_links')
      .where({ id: over.id })
      .update({ expires_at: new Date(0) });
    const { letters } = await issue(scene, 1, { note: 'Chords corrected.' });
    expect(letters).toBe(1);
    const [letter, ...more] = await lettersTo(mail('told'));
    expect(more).toEqual([]);
    expect(letter).toMatchObject({
      name: 'The Trustees',
      subject: 'Revision B of Rose window',
      action: { label: 'Read revision B', url: told.url },
    });
    const text = JSON.stringify(letter);
    for (const word of ['for comment', 'Chords corrected.', 'replaces revision A', 'passphrase']) {
      expect(text).toContain(word);
    }
    expect(text).not.toContain('lime and sand');
    for (const name of ['fixed', 'revoked', 'over'])
      expect(await lettersTo(mail(name))).toEqual([]);
  });

  it('goes without an address where it cannot be made again', async () => {
    const scene = await newScene();
    const email = `old.${scene.notebook}@olvane.example`;
    await insertClientLink(database(), {
      notebookId: scene.notebook,
      tokenHash: hashOf(newSecret()),
      label: 'Old',
      createdBy: scene.owner.id,
      clientEmail: email,
    });
    await issue(scene);
    const [letter] = await lettersTo(email);
    expect(letter).not.toHaveProperty('action');
    expect(JSON.stringify(letter)).toContain('you were given before');
  });
});
