/**
 * npm run bench:reach: what verdicts cost, median CPU milliseconds of several runs. `cold` runs start with a fresh engine each
 * time, as a request does; the process itself is warm.
 */
import { createEngine, type Engine, type Num } from '../../lib/engine/index';
import { checkChain, decideDivision, divide, quadraticChain } from '../../lib/divisions/index';

const RUNS = 7;

function median(times: readonly number[]): number {
  return [...times].sort((a, b) => a - b)[times.length >> 1] as number;
}

function cost(work: () => void, runs = RUNS): number {
  const times: number[] = [];
  for (let k = 0; k <= runs; k++) {
    const start = process.cpuUsage();
    work();
    const used = process.cpuUsage(start);
    if (k > 0) times.push((used.user + used.system) / 1000);
  }
  return median(times);
}

function row(what: string, ms: number): void {
  process.stdout.write(`${what.padEnd(62)} ${ms.toFixed(3).padStart(10)} ms\n`);
}

/** A fresh engine for each run; the value is asked for degree, polynomial, digits and reach. */
const asked = (make: (engine: Engine) => Num) => (): void => {
  const engine = createEngine();
  const value = make(engine);
  engine.degree(value);
  engine.minimalPolynomial(value);
  engine.decimal(value, 30);
  engine.reach(value);
};

const cubes = (engine: Engine): Num => {
  const root = engine.sqrt(engine.integer(5));
  return engine.add(
    engine.realRoot(engine.add(engine.integer(2), root), 3),
    engine.realRoot(engine.sub(engine.integer(2), root), 3),
  );
};

function drain(steps: Iterator<unknown>): void {
  while (steps.next().done !== true);
}

row(
  'cos of a 17th of a turn: value, polynomial, 30 digits',
  cost(asked((e) => e.cosTurn(1n, 17n))),
);
row(
  'cos of a 257th',
  cost(
    asked((e) => e.cosTurn(1n, 257n)),
    3,
  ),
);
row('cos of a 7th', cost(asked((e) => e.cosTurn(1n, 7n))));
row(
  'cos of a 997th, degree 498',
  cost(
    asked((e) => e.cosTurn(1n, 997n)),
    3,
  ),
);
row('cbrt(2+√5) + cbrt(2−√5) = 1', cost(asked(cubes)));
row(
  'root of a quartic with group S4: no',
  cost(asked((e) => e.nearestRoot([1n, 0n, 0n, -1n, -1n], e.integer(1)))),
);
row(
  'root of an octic with group E8: √2+√3+√5',
  cost(asked((e) => e.nearestRoot([1n, 0n, -40n, 0n, 352n, 0n, -960n, 0n, 576n], e.integer(5)))),
);
row(
  'verdict for n below 10⁶, mean of 1 000',
  cost(() => {
    for (let n = 999_000n; n < 1_000_000n; n++) decideDivision(n);
  }) / 1000,
);
row(
  'divide(17) with sizes for radius 1200',
  cost(() => divide(17, '1200 mm'), 3),
);
row(
  'chain of 65537',
  cost(() => quadraticChain(65537), 3),
);
row(
  'chain of 257, checked to 1 000 digits',
  cost(() => drain(checkChain(quadraticChain(257), 1000)), 3),
);
