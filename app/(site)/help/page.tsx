import type { Metadata } from 'next';
import type { ReactNode } from 'react';
import { answersTo } from '@/components/help/answers';
import { GROUPS, type Entry } from '@/components/help/entries';
import { EntryText } from '@/components/help/entry-text';
import { Filter, Filtered } from '@/components/help/filter';
import { PutProvider } from '@/components/help/put-in';
import { CAUTIONS, WORDS } from '@/components/help/text';
import { KEYS } from '@/components/sheet/cell-keys';
import { ALLOWED, Failure } from '@/lib/access';
import { isId } from '@/lib/accounts';
import { currentPerson } from '@/lib/accounts/session';
import { readNotebook } from '@/lib/notebooks';

export const metadata: Metadata = { title: 'How to write cells' };

interface PageProps {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

const keys = KEYS.map(({ keys: pressed, does }) => ({
  name: pressed.join('   ').replaceAll('Mod', 'Ctrl'),
  meaning: does,
}));

const textOf = ({ form, meaning, sample }: Entry) => `${form} ${meaning} ${sample}`;
const pairText = ({ name, meaning }: { name: string; meaning: string }) => `${name} ${meaning}`;
const pairs = [
  { id: 'keys', title: 'Keys', about: 'On a Mac, Cmd stands for Ctrl.', items: keys, mono: true },
  { id: 'words', title: 'Words', about: null, items: WORDS, mono: false },
];
const CONTENTS = [...GROUPS, ...pairs, { id: 'cautions', title: 'Cautions' }];
const TEXTS = [
  ...GROUPS.flatMap(({ entries }) => entries.map(textOf)),
  ...pairs.flatMap(({ items }) => items.map(pairText)),
  ...CAUTIONS,
];

function Part({ id, title, children }: { id: string; title: string; children: ReactNode }) {
  return (
    <section id={id} aria-labelledby={`${id}-title`} className="pt-7">
      <h2 id={`${id}-title`} className="mb-2 font-serif text-head font-semibold">
        {title}
      </h2>
      {children}
    </section>
  );
}

/** The notebook that the page was opened from, when the person may write in it. */
async function sheetBehind(asked: string | string[] | undefined) {
  const person = await currentPerson();
  if (person === null) return { signedIn: false, from: null };
  if (typeof asked !== 'string' || !isId(asked)) return { signedIn: true, from: null };
  const found = await readNotebook(person, asked).then(
    ({ notebook }) => notebook,
    (fault: unknown) => {
      if (fault instanceof Failure) return null;
      throw fault;
    },
  );
  const mayWrite =
    found !== null && ALLOWED[found.role].has('versions.save') && found.archivedAt === null;
  const from = mayWrite ? { id: found.id, title: found.title } : null;
  return { signedIn: true, from };
}

export default async function HelpPage({ searchParams }: PageProps) {
  const samples = GROUPS.flatMap(({ entries }) => entries.map(({ sample }) => sample));
  const [{ signedIn, from }, answers] = await Promise.all([
    sheetBehind((await searchParams).from),
    answersTo(samples),
  ]);
  return (
    <div className="mx-auto grid max-w-page gap-x-10 lg:grid-cols-[13rem_minmax(0,1fr)]">
      <nav aria-label="Contents" className="pt-24 max-lg:hidden print:hidden">
        <div className="sticky top-4 max-h-[calc(100dvh-2rem)] overflow-y-auto">
          <ul className="border-t border-rule text-small">
            {CONTENTS.map(({ id, title }) => (
              <li key={id} className="border-b border-hairline">
                <a
                  href={`#${id}`}
                  className="block py-1 underline-offset-4 hover:bg-snapline-wash hover:underline"
                >
                  {title}
                </a>
              </li>
            ))}
          </ul>
          <div className="mt-5 flex flex-wrap gap-x-2.5 gap-y-0.5 font-mono text-small">
            {GROUPS.filter(({ id }) => id !== 'forms').flatMap(({ entries }) =>
              entries.map(({ id, form }) => (
                <a
                  key={id}
                  href={`#${id}`}
                  className="min-w-6 py-[3px] text-snapline hover:underline"
                >
                  {form.replace(/[(,].*/, '')}
                </a>
              )),
            )}
          </div>
        </div>
      </nav>
      <div className="min-w-0">
        <h1 className="font-serif text-title font-semibold">How to write cells</h1>
        <p className="mb-4 mt-2 max-w-prose font-serif text-note text-soft">
          A sheet holds dimension cells, whose lines are evaluated exactly, and notes in Markdown,
          with TeX between dollar signs. Every sample below is worked out by this server.
        </p>
        <nav aria-label="Contents" className="mb-4 text-small lg:hidden print:hidden">
          {CONTENTS.map(({ id, title }) => (
            <a
              key={id}
              href={`#${id}`}
              className="mr-4 inline-block py-0.5 text-snapline underline underline-offset-4"
            >
              {title}
            </a>
          ))}
        </nav>
        <PutProvider from={from}>
          <Filter texts={TEXTS}>
            {GROUPS.map(({ id, title, entries }) => (
              <Filtered key={id} texts={entries.map(textOf)}>
                <Part id={id} title={title}>
                  {entries.map((entry) => (
                    <Filtered key={entry.id} texts={[textOf(entry)]}>
                      <EntryText
                        entry={entry}
                        results={answers.get(entry.sample) ?? []}
                        signedIn={signedIn}
                      />
                    </Filtered>
                  ))}
                </Part>
              </Filtered>
            ))}
            {pairs.map(({ id, title, about, items, mono }) => (
              <Filtered key={id} texts={items.map(pairText)}>
                <Part id={id} title={title}>
                  {about && <p className="mb-2 text-soft">{about}</p>}
                  {items.map((item) => (
                    <Filtered key={item.name} texts={[pairText(item)]}>
                      <div className="grid gap-x-6 border-t border-hairline py-1.5 sm:grid-cols-[13rem_minmax(0,1fr)]">
                        <span className={mono ? 'font-mono text-source' : 'font-semibold'}>
                          {item.name}
                        </span>
                        <span>{item.meaning}</span>
                      </div>
                    </Filtered>
                  ))}
                </Part>
              </Filtered>
            ))}
            <Filtered texts={CAUTIONS}>
              <Part id="cautions" title="Cautions">
                <ul className="max-w-prose list-disc space-y-1.5 pl-5">
                  {CAUTIONS.map((caution) => (
                    <li key={caution}>{caution}</li>
                  ))}
                </ul>
              </Part>
            </Filtered>
          </Filter>
        </PutProvider>
      </div>
    </div>
  );
}
