import { beforeAll, describe, expect, it } from 'vitest';
import type { VersionLine } from '@/lib/notebooks/types';
import { content, give, newCast, newNotebook, type Cast } from './support/notebook';
import { newcomer } from './support/visitor';

let cast: Cast;
beforeAll(async () => {
  cast = await newCast('R = 1200 mm');
});

const versionsOf = (id: string) => `/api/notebooks/${id}/versions`;

describe('a save', () => {
  it('makes the next version with author, time and note, and leaves the one before as it was', async () => {
    const { owner, editor } = cast;
    const id = await newNotebook(owner, 'R = 1 mm');
    await give(owner, id, editor, 'editor');
    const body = { base: 1, content: content('R = 2 mm'), note: ' wider ' };
    const saved = await editor.post(versionsOf(id), body);
    expect(saved.status).toBe(201);
    expect(saved.json).toMatchObject({ number: 2, unchanged: false });
    const list = (await owner.get(versionsOf(id))).json.versions as VersionLine[];
    expect(list).toMatchObject([
      { number: 2, author: 'Edda', note: 'wider', restoredFrom: null },
      { number: 1, author: 'Owain', note: null, restoredFrom: null },
    ]);
    expect(list[0]?.savedAt).toBe(saved.json.savedAt);
    const old = await owner.get(`${versionsOf(id)}/1`);
    expect(old.json.content).toEqual(content('R = 1 mm'));
    expect((await owner.get(`/api/notebooks/${id}`)).json.content).toEqual(content('R = 2 mm'));
  });

  it('keeps every character of a source', async () => {
    const { owner } = cast;
    const id = await newNotebook(owner, '1');
    const source = 'R = 1200 mm # ≤ “√2·π” \u{1F4D0} a\\b\t"c"\r\n\u0000 é e\u0301 ';
    const saved = await owner.post(versionsOf(id), { base: 1, content: content(source, '') });
    expect(saved.status).toBe(201);
    expect((await owner.get(`${versionsOf(id)}/2`)).json.content).toEqual(content(source, ''));
  });

  it('equal to the newest version makes none and says so, whatever the order of its fields', async () => {
    const { owner } = cast;
    const id = await newNotebook(owner, 'R = 1 mm');
    const { format, settings, cells } = content('R = 1 mm');
    const { digits, unit, step, rounding } = settings;
    const shuffled = { cells, settings: { rounding, step, unit, digits }, format };
    const answer = await owner.post(versionsOf(id), { base: 1, content: shuffled });
    expect(answer.status).toBe(200);
    expect(answer.json).toMatchObject({ number: 1, unchanged: true });
    expect((await owner.get(versionsOf(id))).json.versions).toHaveLength(1);
  });

  it('sent twice because its answer was lost succeeds twice and makes one version', async () => {
    const { owner } = cast;
    const id = await newNotebook(owner, 'R = 1 mm');
    const body = { base: 1, content: content('R = 2 mm') };
    const first = await owner.post(versionsOf(id), body);
    const second = await owner.post(versionsOf(id), body);
    expect([first.status, second.status]).toEqual([201, 200]);
    expect(second.json).toEqual({ ...first.json, unchanged: true });
  });

  it('on an old version is refused with the newest, and both texts are kept', async () => {
    const { owner, editor, notebook } = cast;
    const theirs = content('R = 1300 mm');
    const mine = content('R = 1400 mm');
    const before = (await owner.get(`/api/notebooks/${notebook}`)).json.notebook as {
      version: number;
    };
    const base = before.version;
    const first = await owner.post(versionsOf(notebook), { base, content: theirs });
    expect(first.status).toBe(201);
    const second = await editor.post(versionsOf(notebook), { base, content: mine });
    expect(second.status).toBe(409);
    expect(second.headers.get('content-type')).toContain('application/problem+json');
    expect(second.json).toMatchObject({
      code: 'stale-version',
      head: { number: base + 1, author: 'Owain', content: theirs },
    });
    expect(JSON.stringify(second.json)).not.toContain(owner.email);
    expect((await owner.get(`/api/notebooks/${notebook}`)).json.content).toEqual(theirs);
    const merged = await editor.post(versionsOf(notebook), { base: base + 1, content: mine });
    expect([merged.status, merged.json.number]).toEqual([201, base + 2]);
  });

  it.each([0, -1, 1.5, '1', null, 4_294_967_296])('with the base %s is not valid', async (base) => {
    const body = { base, content: content('2') };
    const answer = await cast.owner.post(versionsOf(cast.notebook), body);
    expect([answer.status, answer.json.code]).toEqual([422, 'invalid']);
    expect(answer.json.fields).toMatchObject([{ field: 'base' }]);
  });

  it('on a version that is not there yet is refused like one on an old version', async () => {
    const body = { base: 4_000_000_000, content: content('3') };
    const answer = await cast.owner.post(versionsOf(cast.notebook), body);
    expect([answer.status, answer.json.code]).toEqual([409, 'stale-version']);
  });
});

describe('saves at the same time', () => {
  it('on one base: exactly one wins each round, and every other is told the winner', async () => {
    const { owner, editor } = cast;
    const id = await newNotebook(owner, 'R = 0 mm');
    await give(owner, id, editor, 'editor');
    for (let round = 1; round <= 4; round += 1) {
      const answers = await Promise.all(
        Array.from({ length: 8 }, (_, index) =>
          (index % 2 === 0 ? owner : editor).post(versionsOf(id), {
            base: round,
            content: content(`R = ${round * 100 + index} mm`),
          }),
        ),
      );
      const won = answers.filter(({ status }) => status === 201);
      const lost = answers.filter(({ status }) => status === 409);
      expect([won.length, lost.length]).toEqual([1, 7]);
      expect(won[0]?.json.number).toBe(round + 1);
      const head = (await owner.get(`/api/notebooks/${id}`)).json.content;
      for (const { json } of lost) {
        expect(json.head).toMatchObject({ number: round + 1, content: head });
      }
    }
    const list = (await owner.get(versionsOf(id))).json.versions as VersionLine[];
    expect(list.map(({ number }) => number)).toEqual([5, 4, 3, 2, 1]);
  });
});

describe('restoring', () => {
  it('makes a new version of the old content and keeps all between', async () => {
    const { owner } = cast;
    const id = await newNotebook(owner, 'R = 1 mm');
    await owner.post(versionsOf(id), { base: 1, content: content('R = 2 mm') });
    const restored = await owner.post(`${versionsOf(id)}/1/restore`, { base: 2 });
    expect([restored.status, restored.json.number]).toEqual([201, 3]);
    const list = (await owner.get(versionsOf(id))).json.versions as VersionLine[];
    expect(list).toMatchObject([{ number: 3, restoredFrom: 1 }, { number: 2 }, { number: 1 }]);
    expect((await owner.get(`${versionsOf(id)}/3`)).json.content).toEqual(content('R = 1 mm'));
    expect((await owner.get(`${versionsOf(id)}/2`)).json.content).toEqual(content('R = 2 mm'));
  });

  it('on an old base is refused with the newest version', async () => {
    const { owner } = cast;
    const id = await newNotebook(owner, 'R = 1 mm');
    await owner.post(versionsOf(id), { base: 1, content: content('R = 2 mm') });
    const answer = await owner.post(`${versionsOf(id)}/1/restore`, { base: 1 });
    expect(answer.json).toMatchObject({ code: 'stale-version', head: { number: 2 } });
  });

  it.each(['0', '99', '1.0', '1e0', 'x', '-1', '99999999999999999999'])(
    'the version %s, which is not there, is not found',
    async (number) => {
      const { owner, notebook } = cast;
      const shown = await owner.get(`${versionsOf(notebook)}/${number}`);
      const restored = await owner.post(`${versionsOf(notebook)}/${number}/restore`, { base: 1 });
      expect([shown.status, restored.status]).toEqual([404, 404]);
    },
  );
});

describe('a version of another notebook', () => {
  it('is not reached through a notebook of one’s own', async () => {
    const { owner, stranger, notebook } = cast;
    await owner.post(versionsOf(notebook), { base: 1, content: content('R = 7 mm') });
    const own = await newNotebook(stranger, '1');
    const answer = await stranger.get(`${versionsOf(own)}/2`);
    expect(answer.status).toBe(404);
    const other = await newcomer('Other');
    expect((await other.get(`${versionsOf(notebook)}/1`)).status).toBe(404);
  });
});
