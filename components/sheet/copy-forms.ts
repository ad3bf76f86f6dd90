import type { Result } from './result';
import { valueTex } from './value-tex';

export interface CopyForm {
  label: string;
  /** What is copied; where it is long to make, it is made when asked for. */
  text: string | (() => Promise<string>);
}

/** The MathML of TeX, without the HTML that shows it on the screen. */
async function mathMl(tex: string): Promise<string> {
  const { default: katex } = await import('katex');
  const html = katex.renderToString(tex, {
    output: 'mathml',
    displayMode: true,
    throwOnError: false,
    strict: 'ignore',
    trust: false,
    maxExpand: 1000,
  });
  return /<math[\s\S]*<\/math>/.exec(html)?.[0] ?? html;
}

function sayWhole({ re, im }: { re: string; im: string | null }): string {
  if (im === null) return re;
  return `${re} ${im.startsWith('-') ? '-' : '+'} ${im.replace(/^-/, '')} i`;
}

/** The forms in which a value leaves the sheet; none for an error. */
export function copyForms(result: Result): CopyForm[] {
  if (result.kind === 'error') return [];
  const forms: CopyForm[] = [];
  if ('exact' in result) {
    forms.push({ label: 'Exact text', text: result.exact.text });
    forms.push({ label: 'TeX', text: result.exact.tex });
  }
  const tex = valueTex(result);
  if (tex !== null && 'exact' in result) forms.push({ label: 'MathML', text: () => mathMl(tex) });
  if (result.kind === 'number') {
    forms.push({ label: 'Decimal', text: sayWhole(result.decimal) });
    if (result.cut) forms.push({ label: 'Cut size', text: result.cut.value });
  }
  if (result.kind === 'point') {
    const { x, y } = result.coordinates;
    // With a tab between, as a table takes them.
    forms.push({ label: 'x and y', text: `${x.decimal.re}\t${y.decimal.re}` });
    if (x.cut && y.cut) {
      forms.push({ label: 'x and y, cut', text: `${x.cut.value}\t${y.cut.value}` });
    }
  }
  if (result.kind === 'angle') forms.push({ label: 'Degrees', text: result.decimal.re });
  forms.push({ label: 'JSON', text: JSON.stringify(result, null, 2) });
  return forms;
}
