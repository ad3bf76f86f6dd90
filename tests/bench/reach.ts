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
const SUM_OF_FOUR = [
  1n,
  0n,
  -136n,
  0n,
  6476n,
  0n,
  -141912n,
  0n,
  1513334n,
  0n,
  -7453176n,
  0n,
  13950764n,
  0n,
  -5596840n,
  0n,
  46225n,
];
/** √(5+√(3+√(2+√2))): ((x² − 5)² − 3)² − 2)² − 2. */
const NEST_OF_FOUR = [
  1n,
  0n,
  -40n,
  0n,
  688n,
  0n,
  -6640n,
  0n,
  39300n,
  0n,
  -146000n,
  0n,
  332416n,
  0n,
  -424160n,
  0n,
  232322n,
];
/** √2 + √3 + a root of x⁴ − x − 1, whose group is S4. */
const WITH_QUARTIC = [
  1n,
  0n,
  -40n,
  -4n,
  600n,
  40n,
  -4154n,
  -544n,
  9966n,
  7516n,
  2624n,
  -17108n,
  -17159n,
  -12200n,
  -4330n,
  19888n,
  8257n,
];
for (const [what, polynomial] of [
  ['root of degree 16, yes: √2+√3+√5+√7', SUM_OF_FOUR],
  ['root of degree 16, yes: √(5+√(3+√(2+√2)))', NEST_OF_FOUR],
  ['root of degree 16, no: an S4 quartic inside', WITH_QUARTIC],
] as const) {
  row(what, cost(asked((e) => e.nearestRoot(polynomial, e.integer(100)))));
}
row(
  'root of degree 32, yes: √(7+√(5+√(3+√(2+√2))))',
  cost(
    asked((e) => {
      const nest = [2, 3, 5, 7].reduce<Num>(
        (inner, a) => e.sqrt(e.add(e.integer(a), inner)),
        e.sqrt(e.integer(2)),
      );
      return e.nearestRoot(e.minimalPolynomial(nest), e.integer(100));
    }),
    3,
  ),
);
row(
  'trisector, degree 12, yes: √61 + sin of a 14th of a turn',
  cost(asked((e) => e.add(e.sqrt(e.integer(61)), e.sinTurn(1n, 14n)))),
);
row(
  'trisector, degree 9 with an affine group: no',
  cost(asked((e) => e.nearestRoot([1n, -3n, 0n, 1n, 15n, -13n, -3n, 0n, 4n, -1n], e.integer(0)))),
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
