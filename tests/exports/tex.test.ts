import { execFileSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { type ExportedNotebook, writeNotebookTex } from '@/lib/exports/index';
import { SAMPLE, evaluated } from './sample';

const folder = mkdtempSync(path.join(tmpdir(), 'surdwork-tex-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));
let documents = 0;

/** Compiles with pdflatex of Debian's texlive-latex-base, stopping at the first error; the log on success. */
function compile(tex: string): string {
  documents += 1;
  const name = `document-${documents}`;
  writeFileSync(path.join(folder, `${name}.tex`), tex);
  const log = () => readFileSync(path.join(folder, `${name}.log`), 'utf8');
  try {
    execFileSync(
      'pdflatex',
      ['-interaction=nonstopmode', '-halt-on-error', '-no-shell-escape', name],
      { cwd: folder, stdio: 'pipe' },
    );
  } catch (error) {
    const failed = existsSync(path.join(folder, `${name}.log`))
      ? log()
          .split('\n')
          .filter(
            (line, index, all) =>
              /^!/.test(line) || /^!/.test(all[index - 1] ?? '') || /^l\.\d/.test(line),
          )
          .join('\n')
      : String(error);
    throw new Error(`pdflatex refused the document: ${failed}`, { cause: error });
  }
  expect(existsSync(path.join(folder, `${name}.pdf`))).toBe(true);
  return log();
}

const withText = (text: string): ExportedNotebook => ({
  ...SAMPLE,
  id: text,
  title: text,
  workshop: text,
  version: { ...SAMPLE.version, author: text },
  cells: [{ id: 'a', kind: 'note', source: text }],
});

describe('the TeX of a notebook', () => {
  const tex = writeNotebookTex(SAMPLE, evaluated(SAMPLE));

  it('compiles', () => {
    expect(compile(tex)).toContain('Output written on');
  });

  it('is ASCII and loads amsmath alone', () => {
    expect(tex).toMatch(/^[\n -~]*$/);
    expect(tex.match(/\\usepackage.*/g)).toEqual(['\\usepackage{amsmath}']);
  });

  it('holds title block, marks, exact values, decimals, cut sizes, reach in words and the caution', () => {
    for (const part of [
      'A seventeen-{}light window',
      'Ferrowick Yard',
      'Ida Marrack',
      '\\fbox{$\\mathrm{pitch}$}',
      '\\fbox{$\\alpha_{1}$}',
      '551.248553449',
      'Cut size:} $551\\,\\mathrm{mm}$, rounded down',
      'straightedge and compass reach it',
      'Error (division-{}by-{}zero)',
      'Exact numbers do not make a structure safe',
    ]) {
      expect(tex).toContain(part);
    }
  });

  it('compiles without any cells', () => {
    compile(writeNotebookTex({ ...SAMPLE, cells: [] }, []));
  });

  it('compiles with every mark the language accepts in its letters', () => {
    const letters = [
      ...'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghjklnopqrstuvwxyzÀÁÂÃÄÅÆÇÈÉÊËÌÍÎÏÐÑÒÓÔÕÖØÙÚÛÜÝÞßàáâãäåæçèéêëìíîïðñòóôõöøùúûüýþÿαβγδεζηθικλμνξορςστυφχψωΑΒΓΔΕΖΗΘΙΚΛΜΝΞΟΠΡΣΤΥΦΧΨΩ',
    ];
    const cells = [
      {
        id: 'a',
        kind: 'dimension' as const,
        source: letters
          .flatMap((letter) => [`${letter} = 1`, `${letter}${letter}_${letter}1 = 2`])
          .join('\n'),
      },
    ];
    const notebook = { ...SAMPLE, cells };
    const results = evaluated(notebook);
    expect(results[0]?.results.filter((result) => result.kind === 'error')).toEqual([]);
    compile(writeNotebookTex(notebook, results));
  });
});

describe('lists, functions, angles and inches in TeX', () => {
  const written = (source: string, settings: Partial<ExportedNotebook['settings']> = {}) => {
    const cells = [{ id: 'a', kind: 'dimension' as const, source }];
    const notebook = { ...SAMPLE, cells, settings: { ...SAMPLE.settings, ...settings } };
    const tex = writeNotebookTex(notebook, evaluated(notebook));
    compile(tex);
    return tex;
  };

  it('sets the items of a list in a table with running numbers, decimals and cut sizes', () => {
    const tex = written('L = [sqrt(2) mm, [3 mm, turn/7], point(1 mm, 2 mm)]');
    expect(tex).toContain('\\textbf{No.}&\\textbf{Decimal}&\\textbf{Cut size}');
    expect(tex).toMatch(/^1&\\raggedright \$1\.41421.*\\mathrm\{mm\}\$&\\raggedright \$1\.5/m);
    expect(tex).toMatch(/^2&\\raggedright a list of 2&/m);
    expect(tex).toMatch(/^2\.2&\\raggedright \$51\.4285.*\^\{\\circ\}\$&/m);
    expect(tex).toMatch(/^3&\\raggedright x \$1.*; y \$2/m);
  });

  it('repeats the head of a long table, which can so go over pages', () => {
    const tex = written('P = ring(point(0 mm, 0 mm), 1500 mm, 60)', { digits: 60 });
    expect(tex.match(/\\textbf\{No\.\}/g)).toHaveLength(3);
    expect(tex.match(/\\tabularnewline/g)).toHaveLength(60);
  });

  it('says what a function takes and reads, and how inches, minutes and seconds were rounded', () => {
    const tex = written('R = 4 ft sqrt(2)\nf(x_1) = R x_1\ng(x) = x\na = turn/7', {
      unit: 'ft',
      step: null,
    });
    expect(tex).toContain('Takes:} x\\_1');
    expect(tex).toContain('Reads:} R\\par');
    expect(tex).toContain('Reads:} nothing else');
    expect(tex).toContain(
      'On a rule in inches:} 5 ft 7 7/8 in, to the nearest 1/64 in, $0.184175\\,\\mathrm{mm}$ below',
    );
    expect(tex).toContain("$^{\\circ}$ 25$'$ 42.9$''$, rounded up");
  });
});

describe('hostile text', () => {
  it.each([
    [
      'commands',
      '\\write18{touch owned} \\input{/etc/passwd} \\end{document} \\def\\x{\\x}\\x \\csname a\\endcsname',
    ],
    ['special characters', '100 % of R_1 & R^2 #3 {open $5 ~ \\ "quoted" | < > `code'],
    ['unbalanced brackets', '}}}{{{ \\} \\{'],
    ['characters by number', '^^5cwrite18{x} ^^M ^^41'],
    ['signs of the trade', '√2 · π × 3 ÷ 4 − 1 ± 0.5° ≤ ⌀ 12′ 6″ ½ ² ³ …'],
    ['other scripts', 'Ünïcödé Žluťoučký ąę ł ø 漢字 עברית 👩‍🔧 \u0000\u0007\u200b'],
    ['mathematics that is broken', '$\\frac{1}$ $x^2^3$ $\\left( x$ $a_b_c$ $}$ ${$ $$ $ $'],
    [
      'mathematics with commands',
      '$\\write18{x}$ $\\input{x}$ $\\def\\a{b}$ $\\catcode`\\$=11$ $\\text{\\write18{x}}$ $\\href{x}{y}$',
    ],
    ['mathematics with characters by number', '$^^5cwrite18$ $x % y$ $a#b$ $a & b$'],
    [
      'Markdown of every kind',
      '# H_1\n\n## `x_y` & *em* **strong _both_**\n\n> quote\n> > deeper\n\n1. one\n   - a\n     - b\n       - c\n         - d\n           - e\n\n```tex\n\\write18{x} % _ ^\n```\n\n    indented \\code\n\n---\n\n| a | b_1 |\n|---|---|\n| 1 | 2 % |\n\n[link_](https://example.test/a_b?c=%20&d=#e) ![pic_](x.png) <b>html</b>\nhard  \nbreak ~~gone~~',
    ],
    ['an empty note', ''],
    ['only spaces', ' \n \n'],
    ['a very long word', 'x'.repeat(3_000)],
  ])('%s: compiles and reaches TeX as text only', (_, text) => {
    const tex = writeNotebookTex(withText(text), []);
    expect(tex).toMatch(/^[\n -~]*$/);
    expect(tex).not.toMatch(/\\(write|input|def|csname|catcode|href)(?![a-z])/);
    expect(tex).not.toContain('^^');
    expect(tex.match(/\\end\{document\}/g)).toHaveLength(1);
    compile(tex);
    expect(existsSync(path.join(folder, 'owned'))).toBe(false);
  });

  it('keeps harmless mathematics in a note as mathematics', () => {
    const tex = writeNotebookTex(
      withText('side $2 R \\sin\\frac{\\pi}{17}$ and $$\\sqrt{a_1^2+b^2}$$'),
      [],
    );
    expect(tex).toContain('$2 R \\sin\\frac{\\pi}{17}$');
    expect(tex).toContain('\\[\\sqrt{a_1^2+b^2}\\]');
    compile(tex);
  });

  it('sets the sources of cells as text', () => {
    const cells = [
      {
        id: 'a',
        kind: 'dimension' as const,
        source: 'R = 2 \\write18{x} % _\n# only a remark\n√2 == ½ ? "',
      },
    ];
    const notebook = { ...SAMPLE, cells };
    const tex = writeNotebookTex(notebook, evaluated(notebook));
    expect(tex).not.toMatch(/\\write/);
    compile(tex);
  });
});
