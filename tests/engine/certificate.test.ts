import { execFileSync, spawnSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { refusal } from '../../lib/certificate-check/verify.mjs';
import { createEngine, type Certificate } from '../../lib/engine/index';
import { evaluateWith } from './expression';

const program = fileURLToPath(new URL('../../lib/certificate-check/verify.mjs', import.meta.url));

/** The certificate of an expression, as it comes out of JSON. */
function certify(source: string): Certificate {
  const e = createEngine();
  const outcome = e.attempt(() => e.certificate(evaluateWith(e, source)));
  if (outcome.kind !== 'value') throw new Error(outcome.message);
  return JSON.parse(JSON.stringify(outcome.value)) as Certificate;
}

const SOURCES = [
  '0',
  '-22/7',
  'sqrt(6)',
  'sqrt(2)+sqrt(3)+sqrt(6)',
  'sqrt(5+2*sqrt(6))',
  '1/(1+sqrt(2)+sqrt(3)+sqrt(5)+sqrt(7))',
  'sqrt(11+2*sqrt(29))+sqrt(16-2*sqrt(29)+2*sqrt(55-10*sqrt(29)))',
  'cos(2*pi/17)',
  'sin(2*pi/17)',
  'sqrt(1+i)',
  'cos(2*pi/15)+i*sin(2*pi/15)',
  '(sqrt(2)-1)^40',
];

describe('certificates', () => {
  it.each(SOURCES)('of %s is accepted by the separate program', (source) => {
    expect(refusal(certify(source))).toBeNull();
  });

  it('names the roots that the value needs and no more', () => {
    expect(certify('sqrt(6)').roots.map((r) => r.radicand.terms)).toEqual([[[[], '6']]]);
    expect(certify('sqrt(2)+sqrt(3)+sqrt(6)').roots).toHaveLength(2);
    expect(
      certify('sqrt(11+2*sqrt(29))+sqrt(16-2*sqrt(29)+2*sqrt(55-10*sqrt(29)))').roots,
    ).toHaveLength(2);
  });

  const damage: [string, (c: Certificate) => void][] = [
    ['a changed coefficient of the polynomial', (c) => (c.minimalPolynomial[1] = '1')],
    [
      'a polynomial of too high a degree',
      (c) => {
        c.minimalPolynomial.push('0');
        c.degree++;
      },
    ],
    [
      'a polynomial that is not primitive',
      (c) => (c.minimalPolynomial = c.minimalPolynomial.map((s) => `${2n * BigInt(s)}`)),
    ],
    ['a changed coordinate', (c) => ((c.value.re.terms[0] as [number[], string])[1] = '-2')],
    [
      'a radicand that is a square',
      (c) => {
        const first = c.roots[0] as Certificate['roots'][0];
        first.radicand.terms = [[[], '4']];
        first.witness = { factors: ['2', '2'] };
      },
    ],
    [
      'a factor that is no prime',
      (c) => ((c.roots[0] as Certificate['roots'][0]).witness = { factors: ['1'] }),
    ],
    [
      'a witness that is a residue',
      (c) => {
        const last = c.roots[1] as Certificate['roots'][0];
        const w = last.witness as { prime: number; residues: number[] };
        last.witness = { prime: w.prime, residues: w.residues.map((r) => r + 1) };
      },
    ],
    [
      'an enclosure beside the root',
      (c) => {
        const e = (c.roots[1] as Certificate['roots'][0]).enclosure;
        e.low = e.high;
      },
    ],
    [
      'an enclosure of the wrong sign',
      (c) => {
        [c.enclosure.re.low, c.enclosure.re.high] = [
          `-${c.enclosure.re.high}`,
          `-${c.enclosure.re.low}`,
        ];
      },
    ],
    ['another format', (c) => ((c as { version: number }).version = 2)],
  ];

  it.each(damage)('with %s is refused', (_, change) => {
    const c = certify('(1+sqrt(3+sqrt(5)*2))/2');
    expect(refusal(c)).toBeNull();
    change(c);
    expect(refusal(c)).toEqual(expect.any(String));
  });

  it('are read by the command from standard input, with the verdict as its exit code', () => {
    const good = JSON.stringify(certify('sqrt(2)+sqrt(3)'));
    expect(execFileSync(process.execPath, [program], { input: good, encoding: 'utf8' })).toBe(
      'accepted\n',
    );
    const bad = spawnSync(process.execPath, [program], { input: '{}', encoding: 'utf8' });
    expect(bad.status).toBe(1);
    expect(bad.stdout).toMatch(/^refused: /);
  });

  it('have a command of their own', () => {
    const file = new URL('../../package.json', import.meta.url);
    const { scripts } = JSON.parse(readFileSync(file, 'utf8')) as {
      scripts: Record<string, string>;
    };
    expect(scripts['verify-certificate']).toBe('node lib/certificate-check/verify.mjs');
  });

  it('are checked by a program that imports nothing but Node itself', () => {
    const imports = [...readFileSync(program, 'utf8').matchAll(/from '([^']+)'/g)].map((m) => m[1]);
    expect(imports.every((name) => name?.startsWith('node:'))).toBe(true);
  });
});
