import { findHunks, hunksBetween, type Hunk } from './align';

/** Three texts brought together: as both wish where they agree, and as either wishes where they do not. */
export interface MergedText {
  readonly clean: boolean;
  /** With my lines wherever the two contradict. */
  readonly mine: string;
  /** With their lines wherever the two contradict. */
  readonly theirs: string;
}

/** An empty text has no lines; so whatever two people write into it stands side by side. */
const linesOf = (text: string): string[] => (text === '' ? [] : text.split('\n'));

/**
 * Merges by line what two sides made of one text. A line that one side changed, added or took away is so in the result;
 * lines that both added at one place stand one after another, theirs first, common ones once. Lines that both changed
 * and differently, or that one changed and the other took away, contradict: both readings are given.
 * Method: three-way comparison over two alignments (Khanna, Kunal and Pierce, “A Formal Investigation of Diff3”,
 * FSTTCS 2007), made finer: changed lines are paired by likeness, so neighbours that different people changed do
 * not contradict. Cost: that of two alignments.
 */
export function mergeText(base: string, mine: string, theirs: string): MergedText {
  if (mine === theirs || theirs === base) return { clean: true, mine, theirs: mine };
  if (mine === base) return { clean: true, mine: theirs, theirs };
  const old = linesOf(base);
  const myHunks = fineHunks(old, linesOf(mine));
  const theirHunks = fineHunks(old, linesOf(theirs));
  const [forMine, forTheirs]: [string[], string[]] = [[], []];
  let clean = true;
  let at = 0;
  for (const group of groupHunks(myHunks, theirHunks)) {
    const before = old.slice(at, group.from);
    const [my, their] = readingsOf(old, group);
    if (my !== their) clean = false;
    forMine.push(...before, ...my);
    forTheirs.push(...before, ...their);
    at = group.to;
  }
  const rest = old.slice(at);
  return {
    clean,
    mine: [...forMine, ...rest].join('\n'),
    theirs: [...forTheirs, ...rest].join('\n'),
  };
}

interface Group {
  from: number;
  to: number;
  mine: Hunk[];
  theirs: Hunk[];
}

/** The very same list twice where the two sides can be brought together. */
function readingsOf(old: readonly string[], group: Group): [readonly string[], readonly string[]] {
  const { from, to, mine, theirs } = group;
  const my = applied(old, group, mine);
  const their = applied(old, group, theirs);
  if (theirs.length === 0) return [my, my];
  if (mine.length === 0 || sameLines(my, their)) return [their, their];
  if (from === to) {
    const both = bothOf(their, my);
    return [both, both];
  }
  return [my, their];
}

function applied(old: readonly string[], { from, to }: Group, hunks: readonly Hunk[]): string[] {
  const lines: string[] = [];
  let at = from;
  for (const hunk of hunks) {
    lines.push(...old.slice(at, hunk.from), ...hunk.with);
    at = hunk.to;
  }
  return [...lines, ...old.slice(at, to)];
}

const sameLines = (some: readonly string[], others: readonly string[]) =>
  some.length === others.length && some.every((line, at) => line === others[at]);

/** Both lists, what they have in common once, the first before the second elsewhere. */
function bothOf(first: readonly string[], second: readonly string[]): string[] {
  const both: string[] = [];
  let at = 0;
  for (const { from, to, with: lines } of findHunks(first, second)) {
    both.push(...first.slice(at, to), ...lines);
    at = Math.max(from, to);
  }
  return [...both, ...first.slice(at)];
}

/** Hunks of both sides that touch the same lines, together; the others each by itself. */
function groupHunks(mine: readonly Hunk[], theirs: readonly Hunk[]): Group[] {
  const groups: Group[] = [];
  const all = [
    ...mine.map((hunk) => ({ hunk, side: 'mine' as const })),
    ...theirs.map((hunk) => ({ hunk, side: 'theirs' as const })),
  ].sort((a, b) => a.hunk.from - b.hunk.from || a.hunk.to - b.hunk.to);
  let open: Group | null = null;
  for (const { hunk, side } of all) {
    if (open === null || !touches(open, hunk)) {
      open = { from: hunk.from, to: hunk.to, mine: [], theirs: [] };
      groups.push(open);
    }
    open.to = Math.max(open.to, hunk.to);
    open[side].push(hunk);
  }
  return groups;
}

function touches(group: Group, { from, to }: Hunk): boolean {
  if (from === to)
    return group.from === group.to ? group.from === from : from < group.to && from > group.from;
  return group.from !== group.to && from < group.to;
}

/** Hunks cut as small as they make sense: line by line where lines are alike, and where lines only go. */
function fineHunks(old: readonly string[], now: readonly string[]): Hunk[] {
  return findHunks(old, now).flatMap(({ from, to, with: lines }) => {
    const gone = old.slice(from, to);
    const pairs = pairAlike(gone, lines);
    const between = hunksBetween(gone, lines, pairs).flatMap((hunk) =>
      hunk.with.length > 0
        ? [hunk]
        : Array.from({ length: hunk.to - hunk.from }, (_, at) => ({
            from: hunk.from + at,
            to: hunk.from + at + 1,
            with: [],
          })),
    );
    const changed = pairs.map(([i, j]) => ({ from: i, to: i + 1, with: lines.slice(j, j + 1) }));
    return [...between, ...changed]
      .map((hunk) => ({ ...hunk, from: hunk.from + from, to: hunk.to + from }))
      .sort((a, b) => a.from - b.from || a.to - b.to);
  });
}

/** Comparisons of lines that pairing may cost; a longer stretch is not paired. */
const MOST_PAIRED = 2_500;

/** The pairing of changed lines, in order, whose likeness adds up to the most. */
function pairAlike(gone: readonly string[], come: readonly string[]): [number, number][] {
  const [rows, columns] = [gone.length, come.length];
  if (rows === 0 || columns === 0 || rows * columns > MOST_PAIRED) return [];
  const width = columns + 1;
  const best = new Uint32Array((rows + 1) * width);
  const likenesses = gone.map((line) => come.map((other) => likeness(line, other)));
  const at = (i: number, j: number) => best[i * width + j] ?? 0;
  for (let i = rows - 1; i >= 0; i -= 1) {
    for (let j = columns - 1; j >= 0; j -= 1) {
      const alike = likenesses[i]?.[j] ?? 0;
      const paired = alike > 0 ? alike + at(i + 1, j + 1) : 0;
      best[i * width + j] = Math.max(paired, at(i + 1, j), at(i, j + 1));
    }
  }
  const pairs: [number, number][] = [];
  let [i, j] = [0, 0];
  while (i < rows && j < columns) {
    const alike = likenesses[i]?.[j] ?? 0;
    if (alike > 0 && at(i, j) === alike + at(i + 1, j + 1)) {
      pairs.push([i, j]);
      [i, j] = [i + 1, j + 1];
    } else if (at(i, j) === at(i + 1, j)) i += 1;
    else j += 1;
  }
  return pairs;
}

const DEFINED = /^\s*(\p{L}[\p{L}\d_]*)\s*(?:\([^()=]*\)\s*)?=(?!=)/u;

/** 0 for lines that have nothing to do with each other; most for two definitions of one mark. */
function likeness(line: string, other: string): number {
  const mark = DEFINED.exec(line)?.[1];
  const otherMark = DEFINED.exec(other)?.[1];
  if (mark !== undefined && mark === otherMark) return 4;
  const longer = Math.max(line.length, other.length);
  const most = Math.min(line.length, other.length);
  let same = 0;
  while (same < most && line[same] === other[same]) same += 1;
  let end = 0;
  while (end < most - same && line.at(-1 - end) === other.at(-1 - end)) end += 1;
  return 2 * (same + end) >= longer ? 2 : 0;
}
