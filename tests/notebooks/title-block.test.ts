import { afterAll, describe, expect, it } from 'vitest';
import { closeDatabase, database } from '@/db/client';
import type { Person } from '@/lib/accounts';
import {
  TitleBlockEntries,
  addPerson,
  changeNotebook,
  changeTitleBlock,
  createNotebook,
  readNotebook,
} from '@/lib/notebooks';
import { newPerson } from '../accounts/support/person';

afterAll(closeDatabase);

async function newSheet() {
  const owner = await newPerson('Maren');
  const { id } = await createNotebook(owner, { title: 'Bay window' });
  return { owner, id };
}
const blockIn = async (person: Person, id: string) =>
  (await readNotebook(person, id)).notebook.titleBlock;

describe('the title block', () => {
  it('says what is known where nobody filled in anything', async () => {
    const { owner, id } = await newSheet();
    expect(await blockIn(owner, id)).toEqual({
      legalOwner: 'Oldacre Joinery',
      identificationNumber: id.slice(0, 8),
      title: 'Bay window',
      supplementaryTitle: '',
      creator: 'Maren',
      approvalPerson: '',
      sheet: '1',
      toleranceClass: null,
      logo: null,
    });
  });

  it('says what was filled in, under the prefix of the workshop', async () => {
    const { owner, id } = await newSheet();
    const { workshop } = (await readNotebook(owner, id)).notebook;
    const titleBlock = { identificationPrefix: 'OJ-', approvalPerson: 'Head of the yard' };
    await database()('workshops')
      .where({ id: workshop.id })
      .update({ defaults: JSON.stringify({ start: { toleranceClass: 'c' }, titleBlock }) });
    await changeTitleBlock(
      owner,
      id,
      TitleBlockEntries.parse({ identificationNumber: '0107', sheet: '1 of 3' }),
    );
    expect(await blockIn(owner, id)).toMatchObject({
      identificationNumber: 'OJ-0107',
      sheet: '1 of 3',
      approvalPerson: 'Head of the yard',
      toleranceClass: 'c',
    });
    await changeTitleBlock(owner, id, TitleBlockEntries.parse({ toleranceClass: 'f' }));
    const emptied = await blockIn(owner, id);
    expect(emptied).toMatchObject({
      identificationNumber: `OJ-${id.slice(0, 8)}`,
      sheet: '1',
      toleranceClass: 'f',
    });
  });

  it('is filled in by owners and editors, and by nobody while the notebook is archived', async () => {
    const { owner, id } = await newSheet();
    const [editor, viewer] = await Promise.all([newPerson('Edda'), newPerson('Vigo')]);
    await addPerson(owner, id, { email: editor.email, role: 'editor' });
    await addPerson(owner, id, { email: viewer.email, role: 'viewer' });
    const entries = TitleBlockEntries.parse({ creator: 'Edda' });
    await changeTitleBlock(editor, id, entries);
    await expect(changeTitleBlock(viewer, id, entries)).rejects.toMatchObject({
      code: 'forbidden',
    });
    await changeNotebook(owner, id, { archived: true });
    await expect(changeTitleBlock(owner, id, entries)).rejects.toMatchObject({ code: 'archived' });
  });

  it('takes no character that cannot be printed, and nothing over its length', () => {
    for (const sheet of ['1\n2', 'a'.repeat(21), '\ud800', 7]) {
      expect(TitleBlockEntries.safeParse({ sheet }).success).toBe(false);
    }
    expect(TitleBlockEntries.safeParse({ revision: 'A' }).success).toBe(false);
  });
});
