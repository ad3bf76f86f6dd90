import type { Compartment } from '@/components/drawing/compartments';
import { figureCompartments, sayFigure, sayFigureBriefly } from './figure-wording';
import { countItems, listCompartments, sayList } from './lists/say-list';
import type { Result } from './result';
import { dmsCompartments, inchesCompartments, speakDms, speakInches } from './say-parts';
import {
  DIRECTIONS,
  type NumberResult,
  reachCompartment,
  sayDecimal,
  sayUnit,
  shorten,
} from './say-number';

/** A positive bound in so many significant figures, rounded up where it is cut, so that it stays a bound. */
export function shortenUp(bound: string, figures: number): string {
  const cut = shorten(bound, figures);
  if (!cut.endsWith('…')) return bound;
  const [whole = '', part = ''] = cut.slice(0, -1).split('.');
  const raised = (BigInt(whole + part) + 1n).toString().padStart(part.length + 1, '0');
  const point = raised.length - part.length;
  return part === '' ? raised : `${raised.slice(0, point)}.${raised.slice(point)}`;
}

/** What stands on the drawn dimension line and below it; null where nothing is cut to length. */
export function sayDimension(
  result: Result,
): { figure: string; below: string; spoken?: string } | null {
  if (result.kind !== 'number' || result.unit === null || !result.real) return null;
  const unit = sayUnit(result.unit);
  if (result.cut) {
    const { value, step, direction } = result.cut;
    const to = direction === 'exact' ? '' : ` to ${step}`;
    return { figure: `${value} ${unit}`, below: `${DIRECTIONS[direction]}${to}` };
  }
  if (!['mm', 'cm', 'm', 'in', 'ft'].includes(result.unit)) return null;
  if (result.inches) {
    const { text, denominator, direction } = result.inches;
    const to = direction === 'exact' ? '' : ` to 1/${denominator} in`;
    return { figure: text, below: `${DIRECTIONS[direction]}${to}`, spoken: speakInches(text) };
  }
  const { re, terminates } = result.decimal;
  const short = shorten(re, 7);
  const exact = terminates && short === re;
  return { figure: `${short} ${unit}`, below: exact ? 'exact' : 'not rounded: no cutting step' };
}

function decimalCompartment(
  { decimal, exact }: Pick<NumberResult, 'decimal' | 'exact'>,
  unit: string | null,
  full: boolean,
): Compartment[] {
  const same = [decimal.re, `${decimal.re} deg`].includes(exact.text);
  if (decimal.terminates && same) return [];
  const text = sayDecimal({ decimal }, full);
  return [
    {
      label: 'Decimal',
      value: unit === null ? text : unit === '°' ? `${text}°` : `${text} ${unit}`,
      figures: true,
    },
  ];
}

const SIDES = { above: 'above', below: 'below', level: 'either way', exact: '' } as const;

/** What a stand-in stands for and how far off it is; a warning where no stand-in keeps to the tolerance when stepped round. */
function standInCompartments(standIn: NumberResult['standIn'], unit: string): Compartment[] {
  if (standIn === undefined) return [];
  const { bound, direction } = standIn.error;
  const off =
    direction === 'exact' ? 'exactly' : `within ${shortenUp(bound, 4)}${unit} ${SIDES[direction]}`;
  const items: Compartment[] = [
    { label: 'Stand-in for', value: standIn.of },
    { label: 'Error', value: off, tone: direction === 'exact' ? 'reached' : 'approximate' },
    { label: 'Strikes', value: String(standIn.strikes.total) },
  ];
  if (standIn.stepped !== null) {
    items.push({
      label: `Ring of ${standIn.stepped.parts}`,
      value: standIn.stepped.inside
        ? 'stays inside the tolerance'
        : 'leaves the tolerance when stepped round, as all that were found do',
      tone: standIn.stepped.inside ? 'reached' : 'approximate',
    });
  }
  return items;
}

function numberCompartments(result: NumberResult, full: boolean): Compartment[] {
  const unit = result.unit === null ? null : sayUnit(result.unit);
  const left = new Map(result.omitted?.map(({ field, message }) => [field, message]));
  const items = [
    ...decimalCompartment(result, unit, full),
    ...inchesCompartments(result.inches, result.unit),
  ];
  if (result.degree !== null) items.push({ label: 'Degree', value: String(result.degree) });
  else
    items.push({
      label: 'Degree',
      value: left.has('degree') ? 'over the limit' : 'none: transcendental',
    });
  items.push(reachCompartment(result.reach));
  if (unit) items.push({ label: 'Unit', value: unit });
  const roots = result.tower?.length ?? 0;
  if (left.has('tower')) items.push({ label: 'Tower', value: 'over the limit' });
  else if (roots > 0)
    items.push({ label: 'Tower', value: roots === 1 ? '1 root' : `${roots} roots` });
  if (!result.real) items.push({ label: 'Kind', value: 'not real' });
  if (result.partOfTurn) {
    items.push({ label: 'On the unit circle', value: `${result.partOfTurn} of a turn` });
  }
  items.push(...standInCompartments(result.standIn, unit ? ` ${unit}` : ''));
  if (full) {
    if (!result.reach?.straightedgeAndCompass && result.reach?.reason) {
      items.push({ label: 'Because', value: result.reach.reason });
    }
    for (const message of left.values()) items.push({ label: 'Left out', value: message });
  }
  return items;
}

/** The compartments under a value; `full` spends the room on every figure. */
export function compartmentsOf(result: Result, full: boolean): Compartment[] {
  switch (result.kind) {
    case 'number':
      return numberCompartments(result, full);
    case 'angle':
      return [
        ...decimalCompartment(result, '°', full),
        ...dmsCompartments(result.dms, full),
        reachCompartment(result.reach),
        ...standInCompartments(result.standIn, '°'),
      ];
    case 'point':
    case 'line':
    case 'circle':
      return figureCompartments(result, full);
    case 'list':
      return listCompartments(result);
    case 'function':
      return [
        { label: 'Takes', value: result.parameters.join(', ') || 'nothing', figures: true },
        result.reads.length > 0
          ? { label: 'Reads', value: result.reads.join(', '), figures: true }
          : { label: 'Reads', value: 'nothing else' },
      ];
    case 'truth':
      return [
        {
          label: 'Decided',
          value: result.truth.value ? 'true, exactly' : 'false, exactly',
          tone: result.truth.value ? 'reached' : 'fault',
        },
        ...(full ? [{ label: 'Because', value: result.truth.reason }] : []),
      ];
    case 'error':
      return [];
  }
}

/** One line in words, for whoever listens instead of looking. */
export function sayResult(result: Result): string {
  const name = result.mark ?? result.source.trim();
  switch (result.kind) {
    case 'error':
      return `${name}: ${result.error.message}`;
    case 'truth':
      return `${name}: ${result.truth.value ? 'true' : 'false'}, exactly.`;
    case 'number': {
      const size =
        (result.inches && !result.cut ? speakInches(result.inches.text) : null) ??
        sayDimension(result)?.figure ??
        shorten(sayDecimal(result, false), 8);
      const reached =
        result.reach?.straightedgeAndCompass === null
          ? 'reach not decided'
          : result.reach?.straightedgeAndCompass
            ? 'reached with straightedge and compass'
            : 'not reached with straightedge and compass';
      return `${name} is ${size}, degree ${result.degree ?? 'none'}, ${reached}.`;
    }
    case 'angle':
      return `${name} is ${speakDms(result.dms.text)}.`;
    case 'point':
    case 'line':
    case 'circle':
      return `${name} is ${sayFigure(result)}.`;
    case 'list':
      return `${name} is ${sayList(result)}.`;
    case 'function':
      return `${result.signature} is a function of ${result.parameters.join(' and ')}${result.reads.length > 0 ? `, reading ${result.reads.join(', ')}` : ''}.`;
  }
}

/** What the index of marks shows beside a name. */
export function sayBriefly(result: Result): string {
  if (result.kind === 'error') return 'error';
  if (result.kind === 'truth') return result.truth.value ? 'true' : 'false';
  if (result.kind === 'angle') return `${shorten(result.decimal.re, 7)}°`;
  if (result.kind === 'list') return countItems(result);
  if (result.kind === 'function') return result.signature;
  if (result.kind !== 'number') return sayFigureBriefly(result);
  if (result.cut) return `${result.cut.value} ${result.unit ?? ''}`.trim();
  if (result.inches) return result.inches.text;
  const short = result.decimal.im === null ? shorten(result.decimal.re, 7) : 'not real';
  return result.unit ? `${short} ${sayUnit(result.unit)}` : short;
}
