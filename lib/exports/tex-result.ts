import type { FunctionResult, Inches, Result } from '@/lib/language/index';
import { cutTex, decimalTex, figureParts, unitTex } from './tex-size';
import { escapeTex } from './tex-text';

/** A formula longer than this is set as running text, where TeX may break it over lines. */
const LONGEST_DISPLAY = 160;

/**
 * TeX of one result, to be copied into a document that loads amsmath: the line as typed and what it is worth.
 * A statement gives its verdict and an error its sentence.
 */
export function resultTex(result: Result): string {
  switch (result.kind) {
    case 'number': {
      const unit = result.unit === null ? '' : unitTex(result.unit);
      const value =
        unit !== '' && isSum(result.exact.text)
          ? `\\left(${result.exact.tex}\\right)${unit}`
          : result.exact.tex + unit;
      return result.exact.staged
        ? stagedFormula(result.typeset, result.exact.tex, unit)
        : formula(result.typeset, value);
    }
    case 'angle':
      return formula(result.typeset, result.exact.tex);
    case 'point':
    case 'line':
    case 'circle':
      return result.exact.staged
        ? stagedFormula(result.typeset, result.exact.tex, '')
        : figureFormula(result);
    case 'list':
      return result.exact.staged
        ? stagedFormula(result.typeset, result.exact.tex, '')
        : formula(result.typeset, result.exact.tex);
    case 'function':
      return displayed(result.typeset);
    case 'truth':
      return `${displayed(result.typeset)}\n\\noindent ${result.truth.value ? 'True' : 'False'}. ${escapeTex(result.truth.reason)}\\par`;
    case 'error': {
      const typed = result.typeset === null ? '' : `${displayed(result.typeset)}\n`;
      return `${typed}\\noindent Error (${escapeTex(result.error.code)}): ${escapeTex(result.error.message)}\\par`;
    }
  }
}

/** A line and a circle have no value to be equal to: their equation stands beside what was typed. */
function figureFormula({ kind, typeset, exact }: FigureResult): string {
  return kind === 'point'
    ? formula(typeset, exact.tex)
    : displayed(`${typeset}:\\quad ${exact.tex}`);
}

/** The line as typed and its value; the value only once where it was typed as it is. */
function formula(typed: string, value: string): string {
  return displayed(typed === value || typed.endsWith(`=${value}`) ? typed : `${typed}=${value}`);
}

/** Whether a written value has terms outside all brackets, so that a unit after it needs brackets. */
function isSum(text: string): boolean {
  let [before, outside] = ['', text];
  while (before !== outside) [before, outside] = [outside, outside.replace(/\([^()]*\)/g, '')];
  return /.[+-]/.test(outside);
}

/** A staged value is a display of several lines by itself and stands below what was typed. */
function stagedFormula(typed: string, stages: string, unit: string): string {
  return `${displayed(typed)}\n\\noindent which is, in stages${unit === '' ? '' : ` and in $${unit}$`},\n${displayed(stages)}`;
}

function displayed(formulaTex: string): string {
  return formulaTex.length > LONGEST_DISPLAY && !formulaTex.includes('\\begin')
    ? `\\begin{sloppypar}\\noindent$\\displaystyle ${formulaTex}$\\end{sloppypar}`
    : `\\[${formulaTex}\\]`;
}

/** What stands beside a value, in plain words, one entry for each compartment of the sheet. */
export function compartments(result: Result): { name: string; tex: string }[] {
  if (result.kind === 'point' || result.kind === 'line' || result.kind === 'circle')
    return figureCompartments(result);
  if (result.kind === 'function') return functionCompartments(result);
  if (result.kind !== 'number' && result.kind !== 'angle') return [];
  const { decimal } = result;
  const unit =
    result.kind === 'angle' ? '^{\\circ}' : result.unit === null ? '' : unitTex(result.unit);
  const imaginary =
    decimal.im === null
      ? ''
      : `${decimal.im.startsWith('-') ? '' : '+'}${decimalTex(decimal.im)}\\,i`;
  const whole =
    imaginary === ''
      ? decimalTex(decimal.re)
      : `\\left(${decimalTex(decimal.re)}${imaginary}\\right)`;
  const entries = [
    { name: 'Decimal', tex: `$${whole}${unit}$${decimal.terminates ? ', exactly' : ''}` },
  ];
  if (result.kind === 'angle') {
    const { text, direction } = result.dms;
    const rounded =
      direction === 'exact' ? 'exactly' : `rounded ${direction} to a tenth of a second`;
    entries.push({ name: 'Degrees, minutes, seconds', tex: `${escapeTex(text)}, ${rounded}` });
  }
  if (result.kind === 'number') {
    if (result.inches !== undefined)
      entries.push({ name: 'On a rule in inches', tex: inchesTex(result.inches) });
    if (result.cut !== undefined)
      entries.push({ name: 'Cut size', tex: cutTex(result.cut, result.unit ?? '') });
    entries.push({
      name: 'Degree',
      tex:
        result.degree === null
          ? result.omitted === undefined
            ? 'none (transcendental)'
            : 'not worked out'
          : String(result.degree),
    });
  }
  entries.push({ name: 'Reach', tex: escapeTex(result.reach.reason) });
  if (result.standIn !== undefined) {
    const { of, error, how } = result.standIn;
    const off = error.direction === 'exact' ? 'exactly' : `error at most ${error.bound}`;
    entries.push({ name: 'Stand-in for', tex: escapeTex(`${of}, ${off}. ${how}`) });
  }
  return entries;
}

/** A length to the nearest division of a rule, and on which side of the exact one that lies. */
function inchesTex({ text, denominator, error, direction }: Inches): string {
  if (direction === 'exact') return `${escapeTex(text)}, exactly`;
  const side = direction === 'up' ? 'above' : 'below';
  return `${escapeTex(text)}, to the nearest 1/${denominator} in, $${error.replace(/^[+-]/, '')}\\,\\mathrm{mm}$ ${side} the exact length`;
}

function functionCompartments({
  parameters,
  reads,
}: FunctionResult): { name: string; tex: string }[] {
  return [
    { name: 'Takes', tex: escapeTex(parameters.join(', ')) },
    { name: 'Reads', tex: reads.length === 0 ? 'nothing else' : escapeTex(reads.join(', ')) },
  ];
}

type FigureResult = Extract<Result, { kind: 'point' | 'line' | 'circle' }>;

function figureCompartments(result: FigureResult): { name: string; tex: string }[] {
  const entries = figureParts(result).flatMap(([name, { decimal, unit, cut }]) => {
    const size = `$${decimalTex(decimal.re)}${unit === null ? '' : unitTex(unit)}$`;
    const exactly = decimal.terminates ? ', exactly' : '';
    const own = [{ name, tex: size + exactly }];
    return cut === undefined
      ? own
      : [...own, { name: `${name}, cut size`, tex: cutTex(cut, unit ?? '') }];
  });
  return [...entries, { name: 'Reach', tex: escapeTex(result.reach.reason) }];
}

/** The mark of a result, for the margin: as it stands before the sign of equality in the line as typeset. */
export function markTex(result: Result): string | null {
  if (result.mark === null) return null;
  if (result.typeset === null) return escapeTex(result.mark);
  return `$${result.typeset.slice(0, result.typeset.indexOf('='))}$`;
}
