import type { Cut, NumberPart, Result } from '@/lib/language/index';
import { breakableDigits, escapeTex } from './tex-text';

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

/** `mm^2` as TeX. */
export function unitTex(unit: string): string {
  const [name = '', exponent] = unit.split('^');
  return exponent === undefined ? `\\,\\mathrm{${name}}` : `\\,\\mathrm{${name}}^{${exponent}}`;
}

/** What stands beside a value, in plain words, one entry for each compartment of the sheet. */
export function compartments(result: Result): { name: string; tex: string }[] {
  if (result.kind === 'point' || result.kind === 'line' || result.kind === 'circle')
    return figureCompartments(result);
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
  if (result.kind === 'number') {
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

type FigureResult = Extract<Result, { kind: 'point' | 'line' | 'circle' }>;

function figureCompartments(result: FigureResult): { name: string; tex: string }[] {
  const entries = partsOf(result).flatMap(([name, { decimal, unit, cut }]) => {
    const size = `$${decimalTex(decimal.re)}${unit === null ? '' : unitTex(unit)}$`;
    const exactly = decimal.terminates ? ', exactly' : '';
    const own = [{ name, tex: size + exactly }];
    return cut === undefined
      ? own
      : [...own, { name: `${name}, cut size`, tex: cutTex(cut, unit ?? '') }];
  });
  return [...entries, { name: 'Reach', tex: escapeTex(result.reach.reason) }];
}

function partsOf(result: FigureResult): [name: string, part: NumberPart][] {
  switch (result.kind) {
    case 'point':
      return Object.entries(result.coordinates);
    case 'line':
      return Object.entries(result.coefficients);
    case 'circle':
      return [
        ['Centre, x', result.centre.x],
        ['Centre, y', result.centre.y],
        ['Radius', result.radius],
      ];
  }
}

/** A decimal string, with a power of ten where it has one. */
function decimalTex(value: string): string {
  const [mantissa = '', exponent] = value.split('e');
  const power = exponent === undefined ? '' : `\\cdot 10^{${exponent.replace('+', '')}}`;
  return breakableDigits(mantissa) + power;
}

const DIRECTIONS: Readonly<Record<Cut['direction'], string>> = {
  up: 'rounded up, so greater than the exact value',
  down: 'rounded down, so less than the exact value',
  exact: 'the exact value itself',
};

function cutTex(cut: Cut, unit: string): string {
  return `$${breakableDigits(cut.value)}${unitTex(unit)}$, ${DIRECTIONS[cut.direction]} (step ${escapeTex(cut.step)}, ${cut.rounding})`;
}

/** The mark of a result, for the margin: as it stands before the sign of equality in the line as typeset. */
export function markTex(result: Result): string | null {
  if (result.mark === null) return null;
  if (result.typeset === null) return escapeTex(result.mark);
  return `$${result.typeset.slice(0, result.typeset.indexOf('='))}$`;
}
