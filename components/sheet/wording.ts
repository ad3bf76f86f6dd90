import type { Compartment } from '@/components/drawing/compartments';
import type { Result } from './result';

type OfKind<K extends Result['kind']> = Extract<Result, { kind: K }>;
export type NumberResult = OfKind<'number'>;

/** Figures shown before a long decimal is cut off with an ellipsis; the whole stays in the title. */
const FIGURES = 14;

/** Superscripts instead of `^2`, a middle dot instead of `*`. */
export function sayUnit(unit: string): string {
  return unit.replace(/\^2/g, '²').replace(/\^3/g, '³').replace(/\*/g, '·');
}

/** Cuts a decimal string after so many significant figures; never rounds, and shows that it cut. */
export function shorten(decimal: string, figures = FIGURES): string {
  const [mantissa = '', exponent] = decimal.split('e');
  let counted = 0;
  let started = false;
  for (let at = 0; at < mantissa.length; at += 1) {
    const sign = mantissa.charAt(at);
    if (sign < '0' || sign > '9') continue;
    started ||= sign !== '0';
    if (started) counted += 1;
    const left = mantissa.length - at - 1;
    if (counted >= figures && left > 1 && mantissa.includes('.') && mantissa.indexOf('.') < at) {
      return `${mantissa.slice(0, at + 1)}…${exponent === undefined ? '' : `e${exponent}`}`;
    }
  }
  return decimal;
}

/** A positive bound in so many significant figures, rounded up where it is cut, so that it stays a bound. */
export function shortenUp(bound: string, figures: number): string {
  const cut = shorten(bound, figures);
  if (!cut.endsWith('…')) return bound;
  const [whole = '', part = ''] = cut.slice(0, -1).split('.');
  const raised = (BigInt(whole + part) + 1n).toString().padStart(part.length + 1, '0');
  const point = raised.length - part.length;
  return part === '' ? raised : `${raised.slice(0, point)}.${raised.slice(point)}`;
}

/** The decimal of a value as one text: `0.25`, `1.4142… + 0.5 i`. */
export function sayDecimal({ decimal }: Pick<NumberResult, 'decimal'>, full: boolean): string {
  const part = (text: string) => (full ? text : shorten(text));
  const { re, im } = decimal;
  if (im === null) return part(re);
  const sign = im.startsWith('-') ? '−' : '+';
  const size = part(im.replace(/^-/, ''));
  return re === '0' && sign === '+' ? `${size} i` : `${part(re)} ${sign} ${size} i`;
}

const DIRECTIONS = { up: 'rounded up', down: 'rounded down', exact: 'exact' } as const;

/** What stands on the drawn dimension line and below it; null where nothing is cut to length. */
export function sayDimension(result: Result): { figure: string; below: string } | null {
  if (result.kind !== 'number' || result.unit === null || !result.real) return null;
  const unit = sayUnit(result.unit);
  if (result.cut) {
    const { value, step, direction } = result.cut;
    const to = direction === 'exact' ? '' : ` to ${step}`;
    return { figure: `${value} ${unit}`, below: `${DIRECTIONS[direction]}${to}` };
  }
  if (!['mm', 'cm', 'm', 'in', 'ft'].includes(result.unit)) return null;
  const { re, terminates } = result.decimal;
  const short = shorten(re, 7);
  const exact = terminates && short === re;
  return { figure: `${short} ${unit}`, below: exact ? 'exact' : 'not rounded: no cutting step' };
}

type Reach = NumberResult['reach'];

export function reachCompartment(reach: Reach | null): Compartment {
  const label = 'Reach';
  if (reach === null) return { label, value: 'not decided', tone: 'approximate' };
  if (reach.straightedgeAndCompass === null) {
    return { label, value: 'not decided', tone: 'approximate' };
  }
  if (reach.straightedgeAndCompass) {
    return { label, value: 'straightedge and compass', tone: 'reached' };
  }
  const value =
    reach.withTrisector === true
      ? 'not with straightedge and compass; with an angle trisector, yes'
      : reach.withTrisector === false
        ? 'not with straightedge and compass, nor with an angle trisector'
        : 'not with straightedge and compass';
  return { label, value, tone: 'approximate' };
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

/** What a stand-in stands for and how far off it is; a warning where stepping it round leaves the tolerance. */
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
        : 'leaves the tolerance when stepped round',
      tone: standIn.stepped.inside ? 'reached' : 'approximate',
    });
  }
  return items;
}

function numberCompartments(result: NumberResult, full: boolean): Compartment[] {
  const unit = result.unit === null ? null : sayUnit(result.unit);
  const left = new Map(result.omitted?.map(({ field, message }) => [field, message]));
  const items = decimalCompartment(result, unit, full);
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
        reachCompartment(result.reach),
        ...standInCompartments(result.standIn, '°'),
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
      const size = sayDimension(result)?.figure ?? shorten(sayDecimal(result, false), 8);
      const reached =
        result.reach?.straightedgeAndCompass === null
          ? 'reach not decided'
          : result.reach?.straightedgeAndCompass
            ? 'reached with straightedge and compass'
            : 'not reached with straightedge and compass';
      return `${name} is ${size}, degree ${result.degree ?? 'none'}, ${reached}.`;
    }
    case 'angle':
      return `${name} is ${shorten(result.decimal.re, 8)} degrees.`;
  }
}

/** What the index of marks shows beside a name. */
export function sayBriefly(result: Result): string {
  if (result.kind === 'error') return 'error';
  if (result.kind === 'truth') return result.truth.value ? 'true' : 'false';
  if (result.kind === 'angle') return `${shorten(result.decimal.re, 7)}°`;
  if (result.cut) return `${result.cut.value} ${result.unit ?? ''}`.trim();
  const short = result.decimal.im === null ? shorten(result.decimal.re, 7) : 'not real';
  return result.unit ? `${short} ${sayUnit(result.unit)}` : short;
}
