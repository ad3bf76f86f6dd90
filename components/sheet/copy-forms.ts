import { singlesOf } from './lists/list-rows';
import type { ListResult, Result, SingleItem } from './result';
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

/** One value to a line, as a column of a table takes them; a point has its two numbers with a tab between. */
function column(
  label: string,
  list: ListResult,
  size: (number: {
    decimal: { re: string; im: string | null };
    cut?: { value: string };
  }) => string | undefined,
): CopyForm[] {
  const line = (item: SingleItem): string | undefined => {
    switch (item.kind) {
      case 'number':
      case 'angle':
        return size(item);
      case 'point': {
        const [x, y] = [size(item.coordinates.x), size(item.coordinates.y)];
        return x === undefined || y === undefined ? undefined : `${x}\t${y}`;
      }
      default:
        return undefined;
    }
  };
  const lines = singlesOf(list).map(line);
  // A value left out would move all below it to a wrong place.
  return lines.every((text) => text !== undefined) ? [{ label, text: lines.join('\n') }] : [];
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
  if (result.kind === 'list') {
    forms.push(...column('Decimals, one a line', result, ({ decimal }) => sayWhole(decimal)));
    forms.push(...column('Cut sizes, one a line', result, ({ cut }) => cut?.value));
  }
  if (result.kind === 'function') {
    forms.push({ label: 'Definition', text: result.source.replace(/#.*$/, '').trim() });
    forms.push({ label: 'TeX', text: result.typeset });
  }
  if (result.kind === 'number' && result.inches)
    forms.push({ label: 'Inches', text: result.inches.text });
  if (result.kind === 'angle') {
    forms.push({ label: 'Degrees', text: result.decimal.re });
    forms.push({ label: 'Degrees, minutes, seconds', text: result.dms.text });
  }
  forms.push({ label: 'JSON', text: JSON.stringify(result, null, 2) });
  return forms;
}
