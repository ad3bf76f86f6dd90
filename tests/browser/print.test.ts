import { execFileSync } from 'node:child_process';
import { beforeAll, describe, expect, it } from 'vitest';
import { IDA, useBrowser, type Visitor } from './support/browser';

const { newVisitor } = useBrowser();

interface Word {
  text: string;
  left: number;
  top: number;
  right: number;
  bottom: number;
}

interface Paper {
  width: number;
  height: number;
  words: Word[];
}

/** The pages of a PDF with every word's place, in points, as Poppler reads them. */
function readPages(pdf: Buffer): Paper[] {
  const found = execFileSync('pdftotext', ['-bbox', '-', '-'], { input: pdf, encoding: 'utf8' });
  return found
    .split('<page ')
    .slice(1)
    .map((page) => {
      const [, width = '', height = ''] = /^width="([\d.]+)" height="([\d.]+)"/.exec(page) ?? [];
      const words = [
        ...page.matchAll(
          /<word xMin="(\S+)" yMin="(\S+)" xMax="(\S+)" yMax="(\S+)">(.*?)<\/word>/g,
        ),
      ].map(([, left, top, right, bottom, text = '']) => ({
        text,
        left: Number(left),
        top: Number(top),
        right: Number(right),
        bottom: Number(bottom),
      }));
      return { width: Number(width), height: Number(height), words };
    });
}

const textOf = ({ words }: Paper) => words.map(({ text }) => text).join(' ');

let ida: Visitor;
let paths: Record<string, string>;

beforeAll(async () => {
  ida = await newVisitor({ colorScheme: 'dark' });
  await ida.signIn(IDA);
  const sheet = await ida.page
    .getByRole('link', { name: 'Seventeen-light window' })
    .getAttribute('href');
  const made = await ida.context.request.post(`/api${sheet}/links`, {
    data: { label: 'For printing' },
    headers: { origin: new URL(ida.page.url()).origin },
  });
  const { token } = (await made.json()) as { token: string };
  paths = {
    notebook: String(sheet),
    version: `${sheet}/versions/1`,
    client: `/client/${token}`,
    revision: `${sheet}/revisions/A`,
  };
});

/** Points of 10 and of 20 millimetres: the margins of ISO 5457, the wider one for filing. */
const NARROW = (10 / 25.4) * 72;
const FILING = (20 / 25.4) * 72;

async function print(name: string, format: 'A4' | 'A3'): Promise<Paper[]> {
  await ida.page.goto(String(paths[name]));
  await ida.page.waitForLoadState('networkidle');
  await ida.page.locator('[data-row] dl').first().waitFor();
  return readPages(await ida.page.pdf({ format, printBackground: true }));
}

describe.each(['notebook', 'version', 'client', 'revision'])('the %s on paper', (name) => {
  it.each(['A4', 'A3'] as const)('is a clean sheet on %s', async (format) => {
    const pages = await print(name, format);
    expect(pages.length).toBeGreaterThan(0);
    expect(pages.length).toBeLessThan(format === 'A4' ? 8 : 5);
    const width = format === 'A4' ? 210 : 297;
    pages.forEach((page, index) => {
      const text = textOf(page);
      expect(Math.round((page.width / 72) * 25.4)).toBe(width);
      expect(text).toContain(`Sheet ${index + 1} of ${pages.length}`);
      for (const field of [
        'Legal owner',
        'Ferrowick Yard',
        'Seventeen-light window',
        'Cutting step',
      ]) {
        expect(text).toContain(field);
      }
      expect(text).toContain('Exact numbers do not make a structure safe');
      const off = page.words.filter(
        ({ left, right, top, bottom }) =>
          left < FILING - 1 ||
          right > page.width - NARROW + 1 ||
          top < NARROW - 1 ||
          bottom > page.height,
      );
      expect(off).toEqual([]);
    });
    const whole = pages.map(textOf).join(' ');
    for (const part of [
      'Notebooks',
      'Sign',
      'Undo',
      'Copy',
      'Export',
      'Add a',
      'Skip to',
      'Light or',
    ]) {
      expect(whole).not.toContain(part);
    }
    expect(whole).toContain('p = 2 R sin(turn/34)');
    expect(whole).toContain('551 mm');
  });

  it('has nothing under the title block, which is the same on every page', async () => {
    const pages = await print(name, 'A4');
    const feet = pages.map(({ words }) => {
      const top = words.find(({ text }) => text === 'Legal')?.top ?? 0;
      expect(top).toBeGreaterThan(0);
      return (
        words
          .filter((word) => word.bottom > top && word.text !== 'Sheet')
          .map(({ text }) => text)
          .filter((text) => !/^\d+$/.test(text))
          // The reader of the PDF puts the same words into another order where other things stand above.
          .sort()
          .join(' ')
      );
    });
    expect(new Set(feet).size).toBe(1);
  });
});

describe('an issued revision on paper', () => {
  it.each([
    ['client', 'B', 'A4'],
    ['client', 'B', 'A3'],
    ['revision', 'A, superseded by B', 'A4'],
  ] as const)(
    'of the %s has its letter and its check code on every sheet',
    async (name, says, format) => {
      const pages = await print(name, format);
      const codes = new Set(
        pages.map((page) => {
          const text = textOf(page);
          expect(text).toContain('Check code');
          const words = page.words.map((word) => word.text);
          const letter = page.words[words.lastIndexOf('Revision')];
          const under = page.words.filter(
            (word) =>
              letter !== undefined &&
              word.top > letter.top &&
              word.top < letter.bottom + 16 &&
              Math.abs(word.left - letter.left) < 3,
          );
          expect(under.map((word) => word.text).join(' ')).toContain(says.split(',')[0]);
          expect(text).toContain(says.includes(',') ? 'superseded by B' : 'for manufacture');
          return words.find((word) => /^[0-9A-F]{4}-[0-9A-F]{4}$/.test(word));
        }),
      );
      expect(codes.size).toBe(1);
      expect([...codes][0]).toBeDefined();
    },
  );
});
