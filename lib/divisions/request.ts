import type { Fraction } from './turn-value';

export const MOST_PARTS = 1_000_000;

export const RADIUS_UNITS = ['mm', 'cm', 'm', 'in', 'ft'] as const;
export type RadiusUnit = (typeof RADIUS_UNITS)[number];

/** A positive rational length, in lowest terms of its own unit. */
export interface Radius extends Fraction {
  unit: RadiusUnit;
}

export type DivisionFault =
  | 'parts-missing'
  | 'parts-not-a-number'
  | 'parts-not-whole'
  | 'parts-zero'
  | 'parts-negative'
  | 'parts-too-many'
  | 'radius-not-a-length'
  | 'radius-not-positive'
  | 'radius-too-long';

/** What was asked cannot be answered: which fault, and a sentence that says what to give instead. */
export class DivisionError extends Error {
  constructor(
    readonly code: DivisionFault,
    message: string,
  ) {
    super(message);
    this.name = 'DivisionError';
  }
}

const WANTED = 'Give a whole number from 1 to 1 000 000.';
const LENGTH_WANTED = 'Give a length such as 1200 mm, 47 1/4 in or 1.2 m.';

/**
 * The number of parts, from a number or from what was typed (spaces between thousands and forms such as 10^6 and 1e6 are
 * taken). Fails with a DivisionError.
 */
export function readParts(given: number | bigint | string): number {
  const shown = brief(String(given));
  const value = typeof given === 'string' ? numberTyped(given) : Number(given);
  if (value === null) throw new DivisionError('parts-missing', `No number of parts. ${WANTED}`);
  if (Number.isNaN(value)) {
    throw new DivisionError('parts-not-a-number', `“${shown}” is not a number. ${WANTED}`);
  }
  if (value < 0) {
    throw new DivisionError('parts-negative', `${shown} is negative. ${WANTED}`);
  }
  if (value > MOST_PARTS) {
    throw new DivisionError('parts-too-many', `${shown} parts are too many here. ${WANTED}`);
  }
  if (!Number.isInteger(value)) {
    throw new DivisionError('parts-not-whole', `${shown} is not a whole number. ${WANTED}`);
  }
  if (value === 0) {
    throw new DivisionError('parts-zero', `A circle cannot be divided into 0 parts. ${WANTED}`);
  }
  return value;
}

function numberTyped(text: string): number | null {
  const close = closed(text);
  if (close === '') return null;
  const power = /^(\d{1,3})\^(\d{1,3})$/.exec(close);
  if (power) return Number(power[1]) ** Number(power[2]);
  return /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d{1,4})?$/i.test(close) ? Number(close) : NaN;
}

/** Without spaces between thousands, and with a plain minus. A whole number before a fraction keeps its space. */
function closed(text: string): string {
  return text
    .trim()
    .replace(/(?<=\d)\s(?=\d{3}(?![\d/]|\s*\/))/gu, '')
    .replace('−', '-');
}

const PATTERN = new RegExp(
  String.raw`^([+-]?)(?:(\d+)\s+)?(\d+(?:\.\d*)?|\.\d+)(?:\s*\/\s*(\d+))?\s*(${RADIUS_UNITS.join('|')})?$`,
);

/**
 * A radius: decimal, fraction, or whole and fraction, with a unit; millimetres where none is given. Fails with a
 * DivisionError. At most 18 digits in each number.
 */
export function readRadius(text: string): Radius {
  const trimmed = closed(text);
  const shown = brief(text.trim());
  const [, sign, whole, number = '', below, unit] = PATTERN.exec(trimmed) ?? [];
  if (number === '' || (whole !== undefined && below === undefined) || /\..*\//.test(trimmed)) {
    throw new DivisionError('radius-not-a-length', `“${shown}” is not a length. ${LENGTH_WANTED}`);
  }
  if ([whole, number, below].some((part) => (part ?? '').length > 19)) {
    throw new DivisionError(
      'radius-too-long',
      `“${shown}” has more than 18 digits. ${LENGTH_WANTED}`,
    );
  }
  const [before = '', after = ''] = number.split('.');
  let d = 10n ** BigInt(after.length) * BigInt(below ?? '1');
  let n = BigInt(before + after) + BigInt(whole ?? '0') * d;
  if (d === 0n) {
    throw new DivisionError('radius-not-a-length', `“${shown}” divides by 0. ${LENGTH_WANTED}`);
  }
  if (sign === '-' || n === 0n) {
    throw new DivisionError(
      'radius-not-positive',
      `A radius must be more than 0, not ${shown}. ${LENGTH_WANTED}`,
    );
  }
  const common = gcd(n, d);
  [n, d] = [n / common, d / common];
  return { n, d, unit: (unit as RadiusUnit | undefined) ?? 'mm' };
}

function gcd(a: bigint, b: bigint): bigint {
  return b === 0n ? a : gcd(b, a % b);
}

function brief(text: string): string {
  return text.length > 40 ? `${text.slice(0, 39)}…` : text;
}
