import type { Metadata } from 'next';
import type { ReactNode } from 'react';
import { CAUTIONS, EXAMPLES, RULES, WORDS } from '@/components/help/text';
import { WordTable } from '@/components/help/word-table';
import { KEYS } from '@/components/sheet/cell-keys';
import { CONSTANTS, FUNCTIONS, UNITS } from '@/lib/language/names';

export const metadata: Metadata = { title: 'How to write cells' };

function Part({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section className="space-y-3">
      <h2 className="font-serif text-figure font-semibold">{title}</h2>
      {children}
    </section>
  );
}

function List({ items }: { items: readonly string[] }) {
  return (
    <ul className="list-disc space-y-1.5 pl-5">
      {items.map((item) => (
        <li key={item}>{item}</li>
      ))}
    </ul>
  );
}

const functions = FUNCTIONS.map(({ signature, meaning }) => ({ name: signature, meaning }));
const keys = KEYS.map(({ keys: pressed, does }) => ({
  name: pressed.join('   ').replaceAll('Mod', 'Ctrl'),
  meaning: does,
}));

export default function HelpPage() {
  return (
    <div className="mx-auto max-w-4xl space-y-10">
      <div>
        <h1 className="font-serif text-title font-semibold">How to write cells</h1>
        <p className="mt-2 max-w-prose text-soft">
          A sheet holds dimension cells, whose lines are evaluated exactly, and notes in Markdown,
          with TeX between dollar signs.
        </p>
      </div>
      <Part title="Lines of a dimension cell">
        <WordTable words={EXAMPLES} />
        <List items={RULES} />
      </Part>
      <Part title="Keys">
        <p className="text-soft">On a Mac, Cmd stands for Ctrl.</p>
        <WordTable words={keys} />
      </Part>
      <Part title="Functions">
        <WordTable words={functions} />
      </Part>
      <Part title="Units and constants">
        <WordTable words={[...UNITS, ...CONSTANTS]} />
      </Part>
      <Part title="Words">
        <WordTable words={WORDS} />
      </Part>
      <Part title="Cautions">
        <List items={CAUTIONS} />
      </Part>
    </div>
  );
}
