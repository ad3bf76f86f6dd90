/**
 * Which equal divisions of the circle can be struck.
 * Straightedge and compass: n is a power of two times distinct Fermat primes (Gauss 1796, Wantzel 1837).
 * With an angle trisector as well: n is 2^a 3^b times distinct Pierpont primes 2^u 3^v + 1 above 3 (Gleason 1988).
 */

export const FERMAT_PRIMES = [3n, 5n, 17n, 257n, 65537n] as const;

/** Trial division stops here; a cofactor beyond the square of it may stay undecided. */
const TRIAL_LIMIT = 1_000_000n;

export type DivisionReach =
  | { readonly compass: true; readonly trisector: true; readonly why: string }
  | { readonly compass: false; readonly trisector: boolean | null; readonly why: string };

/**
 * Decides the division into n equal parts, n ≥ 1, with a reason to be read after "because".
 * A Fermat prime above 65537 would exceed 2^(2^32), far beyond any n that is met, so the answer for the compass is
 * always exact; `trisector` is null where n has a factor that trial division up to a million does not split.
 */
export function decideDivision(n: bigint): DivisionReach {
  let rest = oddPart(n);
  const primes = FERMAT_PRIMES.filter((prime) => rest % prime === 0n);
  for (const prime of primes) rest /= prime;
  if (rest === 1n) return { compass: true, trisector: true, why: whyReached(n, primes) };
  const repeated = FERMAT_PRIMES.find((prime) => rest % prime === 0n);
  const factor = repeated ?? smallestFactor(rest);
  const why =
    repeated !== undefined
      ? `${n} has the prime ${repeated} more than once`
      : factor === null
        ? `${n} has the odd factor ${rest}, which is no product of Fermat primes`
        : factor === n
          ? `${n} is a prime and no Fermat prime`
          : `${n} has the prime factor ${factor}, which is no Fermat prime`;
  return { compass: false, trisector: decideTrisector(n), why };
}

/** n is a power of two times these distinct Fermat primes. */
function whyReached(n: bigint, primes: readonly bigint[]): string {
  const twos = (n / oddPart(n)).toString(2).length - 1;
  const last = primes[primes.length - 1];
  if (last === undefined) return `${n} is a power of two`;
  if (last === n) return `${n} is a Fermat prime`;
  const times = twos === 0 ? '' : twos === 1 ? 'twice ' : `2^${twos} times `;
  const others = primes.slice(0, -1);
  return others.length === 0
    ? `${n} is ${times}the Fermat prime ${last}`
    : `${n} is ${times}the product of the distinct Fermat primes ${others.join(', ')} and ${last}`;
}

function oddPart(n: bigint): bigint {
  let odd = n;
  while (odd % 2n === 0n) odd /= 2n;
  return odd;
}

function smallestFactor(odd: bigint): bigint | null {
  for (let factor = 3n; factor * factor <= odd; factor += 2n) {
    if (factor > TRIAL_LIMIT) return null;
    if (odd % factor === 0n) return factor;
  }
  return odd;
}

function decideTrisector(n: bigint): boolean | null {
  let rest = oddPart(n);
  while (rest % 3n === 0n) rest /= 3n;
  while (rest > 1n) {
    const factor = smallestFactor(rest);
    if (factor === null) return null;
    rest /= factor;
    if (rest % factor === 0n || !isPierpont(factor)) return false;
  }
  return true;
}

function isPierpont(prime: bigint): boolean {
  let rest = prime - 1n;
  while (rest % 2n === 0n) rest /= 2n;
  while (rest % 3n === 0n) rest /= 3n;
  return rest === 1n;
}
