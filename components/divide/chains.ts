import 'server-only';
import {
  chainDocument,
  chainRows,
  checkChain,
  quadraticChain,
  type Chain,
  type ChainRow,
  type FermatPrime,
} from '@/lib/divisions';

/** Rows of a chain that the page shows; the rest is in the file. */
export const ROWS_SHOWN = 24;
/** Digits to which every quadratic of a chain is checked before it is handed out. */
const DIGITS = 1000;

export interface ShownChain {
  chain: Chain;
  rows: ChainRow[];
}

const shown = new Map<FermatPrime, ShownChain>();
const files = new Map<FermatPrime, Promise<string>>();

/** A chain with its first rows, made once. For 65537 that is about a third of a second of work, once in this process. */
export function shownChain(prime: FermatPrime): ShownChain {
  let known = shown.get(prime);
  if (known === undefined) {
    const chain = quadraticChain(prime);
    known = { chain, rows: chainRows(chain, { count: ROWS_SHOWN }) };
    shown.set(prime, known);
  }
  return known;
}

/**
 * The file of a chain, checked first; made once. The check of 65537 is one to two seconds of work, done in slices of at
 * most about a tenth of a second, between which other requests are served.
 */
export function chainFile(prime: FermatPrime): Promise<string> {
  let file = files.get(prime);
  if (file === undefined) {
    file = checkedFile(prime);
    files.set(prime, file);
    file.catch(() => files.delete(prime));
  }
  return file;
}

async function checkedFile(prime: FermatPrime): Promise<string> {
  const { chain } = shownChain(prime);
  const check = await inSlices(checkChain(chain, DIGITS));
  return `${JSON.stringify(chainDocument(chain, check))}\n`;
}

async function inSlices<T>(work: Generator<void, T, void>): Promise<T> {
  for (;;) {
    const step = work.next();
    if (step.done === true) return step.value;
    await new Promise((resolve) => setImmediate(resolve));
  }
}
