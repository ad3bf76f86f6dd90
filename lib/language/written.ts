import type { Exact } from './result';

/** Whether a written value has terms outside all brackets, so that a factor or unit beside it needs brackets. */
export function isSum(text: string): boolean {
  return /.[+-]/.test(outsideBrackets(text));
}

function outsideBrackets(text: string): string {
  let [before, outside] = ['', text];
  while (before !== outside) [before, outside] = [outside, outside.replace(/\([^()]*\)/g, '')];
  return outside;
}

/** A written value with its unit, so that it reads back as that many units: `sqrt(3)/2 mm` would divide by 2 mm. */
export function withUnit(text: string, unit: string | null): string {
  if (unit === null) return text;
  const divided = !/^-?\d+\/\d+$/.test(text) && outsideBrackets(text).includes('/');
  return isSum(text) || divided ? `(${text}) ${unit}` : `${text} ${unit}`;
}

/**
 * Puts written parts together. Those that are staged name their roots r1, r2, … each for itself; here they are numbered
 * on from part to part, so that one chain of quadratics stands before the whole.
 */
export function composeWritten(
  parts: readonly Exact[],
  writeText: (values: string[]) => string,
  writeTex: (values: string[]) => string,
): Exact {
  const staged = parts.map(stagesOf);
  const [lines, texLines]: [string[], string[]] = [[], []];
  const [values, texValues]: [string[], string[]] = [[], []];
  for (const { text, tex } of staged) {
    const before = lines.length;
    const number = (line: string): string =>
      line.replace(/\br(\d+)\b/g, (_, n) => `r${Number(n) + before}`);
    const numberTex = (line: string): string =>
      line.replace(/\br_\{(\d+)\}/g, (_, n) => `r_{${Number(n) + before}}`);
    values.push(number(text.value));
    texValues.push(numberTex(tex.value));
    lines.push(...text.stages.map(number));
    texLines.push(...tex.stages.map(numberTex));
  }
  const value = writeTex(texValues);
  return {
    text: [...lines, writeText(values)].join('; '),
    tex:
      texLines.length === 0
        ? value
        : `\\begin{gathered}${[...texLines, value].join('\\\\')}\\end{gathered}`,
    staged: lines.length > 0,
  };
}

interface Stages {
  readonly stages: readonly string[];
  readonly value: string;
}

function stagesOf({ text, tex, staged }: Exact): { text: Stages; tex: Stages } {
  if (!staged) return { text: { stages: [], value: text }, tex: { stages: [], value: tex } };
  const texLines = tex.replace(/^\\begin\{gathered\}|\\end\{gathered\}$/g, '').split('\\\\');
  return { text: splitLast(text.split('; ')), tex: splitLast(texLines) };
}

const splitLast = (lines: readonly string[]): Stages => ({
  stages: lines.slice(0, -1),
  value: lines.at(-1) ?? '',
});

/** `mm` as TeX after a value, a thin space before it. */
export const unitAfter = (unit: string | null): string =>
  unit === null ? '' : `\\,\\mathrm{${unit}}`;
