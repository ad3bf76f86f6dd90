import type { NotebookContent } from '@/lib/notebooks/content';
import { newcomer, type Visitor } from './visitor';

/** A notebook's content with one dimension cell for each source. */
export function content(...sources: string[]): NotebookContent {
  return {
    format: 1,
    settings: { digits: 30, unit: 'mm', step: '0.5 mm', rounding: 'half-even' },
    cells: sources.map((source, index) => ({ id: `c${index + 1}`, kind: 'dimension', source })),
  };
}

/** Makes a notebook and returns its id. */
export async function newNotebook(owner: Visitor, ...sources: string[]): Promise<string> {
  const title = `Rose window ${sources.length}`;
  const made = await owner.post('/api/notebooks', { title, content: content(...sources) });
  if (made.status !== 201) throw new Error(`No notebook: ${made.text}`);
  return String(made.json.id);
}

export async function give(
  owner: Visitor,
  notebook: string,
  to: Visitor,
  role: 'owner' | 'editor' | 'viewer',
): Promise<string> {
  const given = await owner.post(`/api/notebooks/${notebook}/people`, { email: to.email, role });
  if (given.status !== 201) throw new Error(`No role: ${given.text}`);
  return String(given.json.id);
}

export async function newLink(
  owner: Visitor,
  notebook: string,
  more: Record<string, string> = {},
): Promise<{ id: string; token: string }> {
  const body = { label: 'For the client', ...more };
  const made = await owner.post(`/api/notebooks/${notebook}/links`, body);
  if (made.status !== 201) throw new Error(`No link: ${made.text}`);
  return { id: String(made.json.id), token: String(made.json.token) };
}

/** Issues a version under the next letter, which it returns. */
export async function issue(owner: Visitor, notebook: string, version = 1): Promise<string> {
  const body = { version, purpose: 'for manufacture' };
  const issued = await owner.post(`/api/notebooks/${notebook}/revisions`, body);
  if (issued.status !== 201) throw new Error(`No revision: ${issued.text}`);
  return String(issued.json.letter);
}

export async function newKey(
  person: Visitor,
  scopes: readonly string[] = ['evaluate'],
): Promise<{ id: string; key: string }> {
  const made = await person.post('/api/keys', { label: 'Saw', scopes });
  if (made.status !== 201) throw new Error(`No key: ${made.text}`);
  return { id: String(made.json.id), key: String(made.json.key) };
}

export interface Cast {
  notebook: string;
  owner: Visitor;
  editor: Visitor;
  viewer: Visitor;
  stranger: Visitor;
}

/** A notebook with one person in each role, and somebody who has nothing to do with it. */
export async function newCast(...sources: string[]): Promise<Cast> {
  const [owner, editor, viewer, stranger] = await Promise.all([
    newcomer('Owain'),
    newcomer('Edda'),
    newcomer('Vigo'),
    newcomer('Strand'),
  ]);
  const notebook = await newNotebook(owner, ...sources);
  await give(owner, notebook, editor, 'editor');
  await give(owner, notebook, viewer, 'viewer');
  return { notebook, owner, editor, viewer, stranger };
}
