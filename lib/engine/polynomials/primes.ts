/** Odd primes below 2^15, the moduli of the word-size polynomial arithmetic, in falling order. */
function sieve(limit: number): readonly number[] {
  const composite = new Uint8Array(limit);
  const primes: number[] = [];
  for (let n = 2; n < limit; n++) {
    if (composite[n]) continue;
    primes.push(n);
    for (let k = n * n; k < limit; k += n) composite[k] = 1;
  }
  return primes.slice(1).reverse();
}

let table: readonly number[] | null = null;

export function smallPrimes(): readonly number[] {
  table ??= sieve(1 << 15);
  return table;
}
