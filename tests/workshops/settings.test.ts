import { createHash } from 'node:crypto';
import { afterAll, describe, expect, it } from 'vitest';
import { closeDatabase } from '@/db/client';
import { addPerson, createNotebook, readNotebook } from '@/lib/notebooks';
import {
  WorkshopChange,
  changeWorkshop,
  logoByHash,
  makeWorkshop,
  putLogo,
  readLogo,
  readNotebookLogo,
  readWorkshop,
  removeLogo,
} from '@/lib/workshops';
import { newNotebook, newYard } from './yard';

afterAll(closeDatabase);

const code = (wanted: string) => ({ code: wanted });

/** One white pixel, as encoders write it. */
const PIXEL = Buffer.from(
  'iVBORw0KGgoAAAANSUhEUgAAAAEAAAABCAYAAAAfFcSJAAAADUlEQVR42mP8/5+hHgAHggJ/PchI7wAAAABJRU5ErkJggg==',
  'base64',
);
const HASH = createHash('sha256').update(PIXEL).digest('hex');

const start = {
  unit: 'in',
  step: '1/16 in',
  digits: 12,
  rounding: 'down',
  toleranceClass: 'c',
} as const;

describe('a workshop', () => {
  it('that has decided nothing has the values everything begins with', async () => {
    const yard = await newYard();
    expect(await readWorkshop(yard.member, yard.id)).toEqual({
      id: yard.id,
      name: 'Quarrymoor Yard',
      role: 'member',
      settings: {
        start: { unit: 'mm', step: null, digits: 30, rounding: 'half-even', toleranceClass: null },
        issuing: { editorsIssue: false, checkNeeded: false },
        titleBlock: { legalOwner: '', identificationPrefix: '', approvalPerson: '', logo: null },
      },
    });
  });

  it('is changed group by group: what is not given stays', async () => {
    const yard = await newYard();
    const issuing = { editorsIssue: true, checkNeeded: true };
    await changeWorkshop(yard.admin, yard.id, { issuing });
    await changeWorkshop(yard.admin, yard.id, { name: 'Quarrymoor & Daughters', start });
    const { name, settings } = await readWorkshop(yard.admin, yard.id);
    expect({ name, ...settings }).toMatchObject({
      name: 'Quarrymoor & Daughters',
      start,
      issuing,
    });
  });

  it('loses no change of two that come at once', async () => {
    const yard = await newYard();
    const issuing = { editorsIssue: true, checkNeeded: false };
    await Promise.all([
      changeWorkshop(yard.admin, yard.id, { issuing }),
      changeWorkshop(yard.admin, yard.id, { start }),
      putLogo(yard.admin, yard.id, PIXEL),
    ]);
    const { settings } = await readWorkshop(yard.admin, yard.id);
    expect(settings).toMatchObject({ start, issuing, titleBlock: { logo: { hash: HASH } } });
  });

  it('is changed by admins alone', async () => {
    const yard = await newYard();
    await expect(changeWorkshop(yard.member, yard.id, { start })).rejects.toMatchObject(
      code('forbidden'),
    );
    await expect(putLogo(yard.member, yard.id, PIXEL)).rejects.toMatchObject(code('forbidden'));
    await expect(changeWorkshop(yard.stranger, yard.id, { start })).rejects.toMatchObject(
      code('not-found'),
    );
  });

  it('takes no step that the language cannot read, and nothing it does not know', () => {
    for (const change of [
      {},
      { start: { ...start, step: '0.5 furlongs' } },
      { start: { ...start, step: '-1 mm' } },
      { start: { ...start, step: '' } },
      { start: { ...start, digits: 0 } },
      { name: '  ' },
      { name: 'two\nlines' },
      { titleBlock: { logo: { hash: HASH, width: 1, height: 1 } } },
      { owner: 'me' },
    ]) {
      expect(WorkshopChange.safeParse(change).success).toBe(false);
    }
    expect(WorkshopChange.safeParse({ start }).success).toBe(true);
  });

  it('can be made by anybody, who is its only admin', async () => {
    const { stranger, admin } = await newYard();
    const { id } = await makeWorkshop(stranger, { name: 'A second one' });
    expect(await readWorkshop(stranger, id)).toMatchObject({ name: 'A second one', role: 'admin' });
    await expect(readWorkshop(admin, id)).rejects.toMatchObject(code('not-found'));
  });
});

describe('a new notebook', () => {
  it('begins with the values of its workshop, unless it comes with content', async () => {
    const yard = await newYard();
    await changeWorkshop(yard.admin, yard.id, { start });
    const id = await newNotebook(yard.member, yard.id);
    const { toleranceClass, ...settings } = start;
    const { content, notebook } = await readNotebook(yard.member, id);
    expect(content).toEqual({ format: 1, settings, cells: [] });
    expect(notebook.titleBlock.toleranceClass).toBe(toleranceClass);
    const own = {
      format: 1 as const,
      settings: { unit: 'm', step: null, digits: 40, rounding: 'up' } as const,
      cells: [],
    };
    const made = await createNotebook(yard.member, {
      title: 'Own',
      workshopId: yard.id,
      content: own,
    });
    expect((await readNotebook(yard.member, made.id)).content).toEqual(own);
  });

  it('that is there already keeps its values', async () => {
    const yard = await newYard();
    const id = await newNotebook(yard.member, yard.id);
    const before = (await readNotebook(yard.member, id)).content;
    await changeWorkshop(yard.admin, yard.id, { start });
    expect((await readNotebook(yard.member, id)).content).toEqual(before);
  });
});

describe('a logo', () => {
  it('stands in the title block of every notebook of the workshop', async () => {
    const yard = await newYard();
    const id = await newNotebook(yard.member, yard.id);
    const logo = await putLogo(yard.admin, yard.id, PIXEL);
    expect(logo).toEqual({ hash: HASH, width: 1, height: 1 });
    expect((await readNotebook(yard.member, id)).notebook.titleBlock.logo).toEqual(logo);
    await removeLogo(yard.admin, yard.id);
    expect((await readNotebook(yard.member, id)).notebook.titleBlock.logo).toBeNull();
  });

  it('is read byte for byte by members and by who has a role on a notebook, and by nobody else', async () => {
    const yard = await newYard();
    const id = await newNotebook(yard.member, yard.id);
    await putLogo(yard.admin, yard.id, PIXEL);
    const read = await readLogo(yard.member, yard.id, HASH);
    expect(read).toMatchObject({ sha256: HASH, mediaType: 'image/png' });
    expect(PIXEL.equals(read.bytes)).toBe(true);
    await expect(readLogo(yard.stranger, yard.id, HASH)).rejects.toMatchObject(code('not-found'));
    await expect(readNotebookLogo(yard.stranger, id, HASH)).rejects.toMatchObject(
      code('not-found'),
    );
    await addPerson(yard.member, id, { email: yard.stranger.email, role: 'viewer' });
    expect((await readNotebookLogo(yard.stranger, id, HASH)).sha256).toBe(HASH);
    await expect(readLogo(yard.stranger, yard.id, HASH)).rejects.toMatchObject(code('not-found'));
  });

  it('that was taken down can still be shown by what was issued with it', async () => {
    const yard = await newYard();
    await putLogo(yard.admin, yard.id, PIXEL);
    await removeLogo(yard.admin, yard.id);
    expect(PIXEL.equals((await logoByHash(HASH)).bytes)).toBe(true);
    for (const hash of ['', 'x', '0'.repeat(64), `${HASH}0`, HASH.toUpperCase()]) {
      await expect(logoByHash(hash)).rejects.toMatchObject(code('not-found'));
    }
  });

  it('is refused when it is no picture, or too large a one', async () => {
    const yard = await newYard();
    const wide = Buffer.from(PIXEL);
    wide.writeUInt32BE(2_001, 16);
    for (const bytes of [Buffer.from('<svg/>'), PIXEL.subarray(0, 60), wide]) {
      await expect(putLogo(yard.admin, yard.id, bytes)).rejects.toMatchObject(code('invalid'));
    }
    expect((await readWorkshop(yard.admin, yard.id)).settings.titleBlock.logo).toBeNull();
  });
});
