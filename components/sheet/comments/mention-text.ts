import { mentionOf, piecesOf } from '@/lib/notebooks/comment-text';

/** Somebody who can be mentioned. */
export interface Mentionable {
  id: string;
  name: string;
  email: string;
}

/** How somebody is written while one types: by name, and by address too where another has the same name. */
export function labelOf(person: Mentionable, people: readonly Mentionable[]): string {
  const namesakes = people.filter(({ name }) => name === person.name).length;
  return namesakes > 1 ? `${person.name} (${person.email})` : person.name;
}

const escaped = (text: string) => text.replace(/[.*+?^${}()|[\]\\]/g, '\\$&');

/** What was typed, with every `@` and label turned into the mention of that person. */
export function withMentions(typed: string, people: readonly Mentionable[]): string {
  const byLabel = new Map(people.map((person) => [labelOf(person, people), person.id]));
  const labels = [...byLabel.keys()].sort((a, b) => b.length - a.length);
  if (labels.length === 0) return typed;
  const written = new RegExp(`@(${labels.map(escaped).join('|')})(?![\\p{L}\\p{N}_])`, 'gu');
  return typed.replace(written, (whole, label: string) => {
    const id = byLabel.get(label);
    return id === undefined ? whole : mentionOf(id);
  });
}

/** A comment as its author changes it: every mention by its label, or by the name of somebody who has left. */
export function asTyped(
  comment: string,
  people: readonly Mentionable[],
  names: Readonly<Record<string, string>>,
): string {
  return piecesOf(comment)
    .map((piece) => {
      if (piece.kind === 'text') return piece.text;
      const person = people.find(({ id }) => id === piece.id);
      return `@${person ? labelOf(person, people) : (names[piece.id] ?? 'somebody')}`;
    })
    .join('');
}

/** The beginning of a name that is being typed before the cursor. */
export interface Beginning {
  /** Where its `@` stands. */
  from: number;
  text: string;
}

/** `@` at the start or behind a blank, and what follows it up to the cursor. */
export function findBeginning(text: string, cursor: number): Beginning | null {
  const found = /(?:^|[\s(])@([^@\n]{0,40})$/u.exec(text.slice(0, cursor));
  if (!found) return null;
  const [, beginning = ''] = found;
  return { from: cursor - beginning.length - 1, text: beginning };
}

const fold = (text: string) => text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase();
const OFFERED = 8;

/** Those whose name, or a part of it, begins so; at most eight. */
export function offersFor(beginning: string, people: readonly Mentionable[]): Mentionable[] {
  const wanted = fold(beginning);
  return people
    .filter((person) => {
      const label = fold(labelOf(person, people));
      return label.startsWith(wanted) || label.split(' ').some((part) => part.startsWith(wanted));
    })
    .slice(0, OFFERED);
}
