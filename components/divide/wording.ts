import type { Compartment } from '@/components/drawing/compartments';
import type { Division, PrimePower } from '@/lib/divisions';

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** 60 as `2² · 3 · 5`; a prime, and 1, as itself. */
export function sayFactors(factors: readonly PrimePower[]): string {
  if (factors.length === 0) return '1';
  return factors
    .map(({ prime, exponent }) => `${prime}${exponent === 1 ? '' : superscript(exponent)}`)
    .join(' · ');
}

function superscript(n: number): string {
  return [...String(n)].map((digit) => SUPERSCRIPTS.charAt(Number(digit))).join('');
}

/** A decimal with a real minus sign. */
export function sayDecimal(decimal: string): string {
  return decimal.replace('-', '−');
}

/** 1 000 000 with spaces that do not break. */
export function sayCount(n: number): string {
  return String(n).replace(/\B(?=(\d{3})+$)/g, '\u202f');
}

/** The verdict in one sentence. */
export function sayVerdict({ parts, reach }: Division): string {
  const what = parts === 1 ? 'One part' : `${sayCount(parts)} equal parts`;
  if (reach.compass) return `${what}: straightedge and compass reach this division exactly.`;
  if (reach.trisector === true) {
    return `${what}: straightedge and compass do not reach this; with an angle trisector as well it is exact.`;
  }
  return `${what}: neither straightedge and compass nor an angle trisector reach this.`;
}

/** Why, sentence by sentence. */
export function sayReasons({ parts, factors, reach }: Division): string[] {
  const isComposite = factors.some(({ prime }) => prime !== parts);
  const product = isComposite ? `${sayCount(parts)} = ${sayFactors(factors)}; ` : '';
  const reasons = [`${product}${reach.why}.`];
  reasons.push(
    reach.compass
      ? 'Straightedge and compass reach a power of two times distinct Fermat primes (3, 5, 17, 257, 65537), and nothing else (Gauss 1801, Wantzel 1837).'
      : 'Straightedge and compass reach only a power of two times distinct Fermat primes: 3, 5, 17, 257, 65537 (Gauss 1801, Wantzel 1837).',
  );
  if (!reach.compass) {
    const wanted =
      'An angle trisector adds the factor 3 any number of times, and distinct primes one above a product of twos and threes: 7, 13, 19, 37 … (Gleason 1988).';
    reasons.push(reach.trisector === true ? wanted : `${wanted} It does not help here.`);
  }
  return reasons;
}

export function verdictCompartments(division: Division): Compartment[] {
  const { parts, factors, reach, degree } = division;
  return [
    reach.compass
      ? { label: 'Reach', value: 'straightedge and compass', tone: 'reached' }
      : {
          label: 'Reach',
          value:
            reach.trisector === true
              ? 'with an angle trisector'
              : 'not, nor with an angle trisector',
          tone: 'approximate',
        },
    { label: 'Parts', value: sayCount(parts), figures: true },
    { label: 'Factors', value: sayFactors(factors), figures: true },
    { label: 'Degree of the cosine', value: sayCount(degree), figures: true },
  ];
}
