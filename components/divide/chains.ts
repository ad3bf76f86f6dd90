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

/** The page shows the first rows of a chain, as many as have this many terms together; the rest is in the file. */
const TERMS_SHOWN = 100;
/** Digits to which every quadratic of a chain is checked before it is handed out. */
const DIGITS = 1000;

export interface ShownChain {
  chain: Chain;
  rows: ChainRow[];
}

const shown = new Map<FermatPrime, ShownChain>();
const files = new Map<FermatPrime, Promise<string>>();

/** A chain with its first rows, made once. For 65537 that is about a third of a second of work, once in each process. */
export function shownChain(prime: FermatPrime): ShownChain {
  let known = shown.get(prime);
  if (known === undefined) {
    const chain = quadraticChain(prime);
    known = { chain, rows: chainRows(chain, { count: rowsShown(chain) }) };
    shown.set(prime, known);
  }
  return known;
}

function rowsShown({ quadratics }: Chain): number {
  let terms = 0;
  const cut = quadratics.findIndex(({ product }) => (terms += product.terms.length) > TERMS_SHOWN);
  return cut === -1 ? quadratics.length : cut;
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
