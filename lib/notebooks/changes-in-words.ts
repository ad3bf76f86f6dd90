import { countFollowing, outlineOf, type Definition } from '@/lib/evaluation';
import { questionOf } from './answers';
import type { NotebookCell, NotebookContent } from './content';
import { SETTINGS, findMoved, sameCell } from './merge';

/** What became of a content, in words: short clauses, and how many values follow from changed marks. */
export interface WordsOfChange {
  /** In the order of what matters most; sources stand between backticks. */
  items: string[];
  follow: number;
}

/** In which wording; raised when the words change, so that stored ones are written anew. */
export const WORDING = 1;

/** Clauses that are kept of one change. */
const MOST_ITEMS = 40;
/** UTF-16 units of a source that is quoted whole. */
const QUOTED = 40;

/**
 * Says what differs between two contents: marks first, then lines, sections, notes, order and settings. Deterministic.
 * Cost: reading both.
 */
export function describeChanges(from: NotebookContent, to: NotebookContent): WordsOfChange {
  const before = outlineOf(questionOf(from).cells ?? []);
  const after = outlineOf(questionOf(to).cells ?? []);
  const marks = describeMarks(before.definitions, after.definitions);
  const items = [
    ...marks.items,
    ...describeLines(before.others, after.others),
    ...describeTexts(from, to),
    ...describeMoves(from, to),
    ...describeSettings(from, to),
  ];
  return { items: items.slice(0, MOST_ITEMS), follow: countFollowing(after, marks.changed) };
}

/** The words as one clause: at most so many items, then how many more. */
export function sayChanges({ items, follow }: WordsOfChange, most = 3): string {
  if (items.length === 0) return 'left everything as it was';
  const shown = items.slice(0, most);
  const more = items.length - shown.length;
  const list = more > 0 ? `${shown.join(', ')} and ${more} more` : joined(shown);
  if (follow === 0) return list;
  return `${list}; ${follow} ${follow === 1 ? 'value follows' : 'values follow'}`;
}

const joined = (items: readonly string[]) =>
  items.length < 2 ? items.join('') : `${items.slice(0, -1).join(', ')} and ${items.at(-1) ?? ''}`;

function quoted(text: string): string {
  const plain = text.replaceAll('`', '′');
  const short = plain.length > QUOTED ? `${[...plain].slice(0, QUOTED).join('')}…` : plain;
  return `\`${short || ' '}\``;
}

const counted = (count: number, one: string, many: string) =>
  count === 1 ? one : `${count} ${many}`;

function describeMarks(
  before: readonly Definition[],
  after: readonly Definition[],
): { items: string[]; changed: Set<string> } {
  const [old, now] = [textsByMark(before), textsByMark(after)];
  const changed = new Set<string>();
  const items: string[] = [];
  for (const [mark, texts] of now) {
    const was = old.get(mark);
    if (was === undefined || was.join('\n') === texts.join('\n')) continue;
    changed.add(mark);
    const isOnce = was.length === 1 && texts.length === 1;
    items.push(
      isOnce
        ? `changed \`${mark}\` from ${quoted(was[0] ?? '')} to ${quoted(texts[0] ?? '')}`
        : `changed \`${mark}\``,
    );
  }
  const added = [...now.keys()].filter((mark) => !old.has(mark));
  const gone = [...old.keys()].filter((mark) => !now.has(mark));
  const same = (mark: string, other: string) => {
    const [one] = before.filter((definition) => definition.mark === mark);
    const [two] = after.filter((definition) => definition.mark === other);
    return one !== undefined && two !== undefined && one.cell === two.cell && one.text === two.text;
  };
  for (const mark of gone) {
    const at = added.findIndex((other) => same(mark, other));
    if (at < 0) {
      items.push(`took out \`${mark}\``);
      continue;
    }
    items.push(`renamed \`${mark}\` to \`${added[at] ?? ''}\``);
    added.splice(at, 1);
  }
  items.push(...added.map((mark) => `added \`${mark}\``));
  return { items, changed };
}

function textsByMark(definitions: readonly Definition[]): Map<string, string[]> {
  const texts = new Map<string, string[]>();
  for (const { mark, text } of definitions) {
    const known = texts.get(mark);
    if (known) known.push(text);
    else texts.set(mark, [text]);
  }
  return texts;
}

/** What of one list the other does not have, counted as often as it stands there. */
function missingFrom(list: readonly string[], other: readonly string[]): string[] {
  const left = new Map<string, number>();
  for (const text of other) left.set(text, (left.get(text) ?? 0) + 1);
  return list.filter((text) => {
    const count = left.get(text) ?? 0;
    left.set(text, count - 1);
    return count <= 0;
  });
}

function describeLines(before: readonly string[], after: readonly string[]): string[] {
  const added = missingFrom(after, before);
  const gone = missingFrom(before, after);
  const pairs = Math.min(added.length, gone.length);
  const [first = '', firstGone = ''] = [added[0], gone[0]];
  if (pairs === 1 && added.length === 1 && gone.length === 1)
    return [`changed ${quoted(firstGone)} to ${quoted(first)}`];
  const more = added.length - pairs;
  const less = gone.length - pairs;
  return [
    ...(pairs > 0 ? [`changed ${counted(pairs, 'a line', 'lines')}`] : []),
    ...(more > 0
      ? [`added ${more === 1 && pairs === 0 ? quoted(first) : counted(more, 'a line', 'lines')}`]
      : []),
    ...(less > 0
      ? [
          `took out ${less === 1 && pairs === 0 ? quoted(firstGone) : counted(less, 'a line', 'lines')}`,
        ]
      : []),
  ];
}

type Kind = NotebookCell['kind'];

/** Sections, notes, and empty cells: what holds no figures. */
function describeTexts(from: NotebookContent, to: NotebookContent): string[] {
  const old = new Map(from.cells.map((cell) => [cell.id, cell]));
  const now = new Map(to.cells.map((cell) => [cell.id, cell]));
  const added = (kind: Kind) => to.cells.filter((cell) => cell.kind === kind && !old.has(cell.id));
  const gone = (kind: Kind) => from.cells.filter((cell) => cell.kind === kind && !now.has(cell.id));
  const changed = (kind: Kind) =>
    to.cells.flatMap((cell) => {
      const was = old.get(cell.id);
      return was && cell.kind === kind && was.source !== cell.source ? [{ was, cell }] : [];
    });
  const said = (verb: string, cells: readonly NotebookCell[], one: string, many: string) =>
    cells.length === 0 ? [] : [`${verb} ${counted(cells.length, one, many)}`];
  const headed = (verb: string, cells: readonly NotebookCell[]) => {
    const [only] = cells;
    return only && cells.length === 1
      ? [`${verb} the section “${only.source}”`]
      : said(verb, cells, 'a section', 'sections');
  };
  const isEmpty = ({ source }: NotebookCell) => source.trim() === '';
  const renamed = changed('section');
  const [first] = renamed;
  return [
    ...headed('added', added('section')),
    ...(first && renamed.length === 1
      ? [`renamed the section “${first.was.source}” to “${first.cell.source}”`]
      : said(
          'renamed',
          renamed.map(({ cell }) => cell),
          'a section',
          'sections',
        )),
    ...headed('took out', gone('section')),
    ...said('added', added('note'), 'a note', 'notes'),
    ...said(
      'changed',
      changed('note').map(({ cell }) => cell),
      'a note',
      'notes',
    ),
    ...said('took out', gone('note'), 'a note', 'notes'),
    ...said('added', added('dimension').filter(isEmpty), 'an empty cell', 'empty cells'),
    ...said('took out', gone('dimension').filter(isEmpty), 'an empty cell', 'empty cells'),
  ];
}

function describeMoves(from: NotebookContent, to: NotebookContent): string[] {
  const ids = (content: NotebookContent) => content.cells.map(({ id }) => id);
  const moved = findMoved(ids(from), ids(to)).size;
  return moved === 0 ? [] : [`moved ${counted(moved, 'a cell', 'cells')}`];
}

const SETTING_NAMES = {
  digits: 'digits',
  unit: 'unit',
  step: 'cutting step',
  rounding: 'rounding',
} as const;

function describeSettings(from: NotebookContent, to: NotebookContent): string[] {
  const items = SETTINGS.flatMap((name) => {
    const [was, is] = [from.settings[name] ?? 'none', to.settings[name] ?? 'none'];
    return was === is ? [] : [`set the ${SETTING_NAMES[name]} from ${was} to ${is}`];
  });
  const old = new Map(from.cells.map((cell) => [cell.id, cell]));
  const own = to.cells.filter((cell) => {
    const was = old.get(cell.id);
    return was !== undefined && !sameCell({ ...was, source: cell.source, kind: cell.kind }, cell);
  });
  return own.length === 0
    ? items
    : [...items, `changed what ${counted(own.length, 'a cell is', 'cells are')} given in`];
}
