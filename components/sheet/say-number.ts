import type { Compartment } from '@/components/drawing/compartments';
import type { Result } from './result';

export type NumberResult = Extract<Result, { kind: 'number' }>;

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

/** The decimal of a value as one text: `0.25`, `1.4142… + 0.5 i`. */
export function sayDecimal({ decimal }: Pick<NumberResult, 'decimal'>, full: boolean): string {
  const part = (text: string) => (full ? text : shorten(text));
  const { re, im } = decimal;
  if (im === null) return part(re);
  const sign = im.startsWith('-') ? '−' : '+';
  const size = part(im.replace(/^-/, ''));
  return re === '0' && sign === '+' ? `${size} i` : `${part(re)} ${sign} ${size} i`;
}

export const DIRECTIONS = { up: 'rounded up', down: 'rounded down', exact: 'exact' } as const;

type Reach = NumberResult['reach'];

export function reachCompartment(reach: Omit<Reach, 'reason'> | null): Compartment {
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
