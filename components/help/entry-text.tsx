import { Compartments } from '@/components/drawing/compartments';
import type { Result } from '@/components/sheet/result';
import { largeTex } from '@/components/sheet/value-tex';
import { compartmentsOf } from '@/components/sheet/wording';
import { CopyButton } from '@/components/ui/copy-button';
import { Sentence } from '@/components/ui/sentence';
import { Tex } from '@/components/ui/tex';
import type { Entry } from './entries';
import { PutIn } from './put-in';

/** Of the strip under a value, what tells most in a list of samples. */
const SHOWN = [
  'Decimal',
  'Feet and inches',
  'Inches',
  'Degrees, minutes, seconds',
  'Items',
  'Takes',
  'Reads',
  'Reach',
  'Decided',
  'Stand-in for',
  'Error',
];

function SampleResult({ result }: { result: Result }) {
  const tex = largeTex(result);
  const items = compartmentsOf(result, false).filter(({ label }) => SHOWN.includes(label));
  return (
    <div className="flex flex-wrap items-center gap-x-4 gap-y-1">
      <div
        className="max-w-full overflow-x-auto overflow-y-hidden py-1 text-note"
        role="group"
        aria-label="Exact value"
        tabIndex={0}
      >
        {result.kind === 'error' ? result.error.message : tex !== null && <Tex tex={tex} />}
      </div>
      <Compartments items={items} />
    </div>
  );
}

interface EntryTextProps {
  entry: Entry;
  results: readonly Result[];
  /** Whether somebody is here who has notebooks. */
  signedIn: boolean;
}

/** A word of the reference: how it is written, what it means, and a sample at work. */
export function EntryText({ entry, results, signedIn }: EntryTextProps) {
  const { id, form, meaning, parameters, sample } = entry;
  return (
    <article
      id={id}
      className="border-t border-hairline py-3 target:bg-snapline-wash [break-inside:avoid]"
    >
      <h3 className="font-mono text-source font-medium [overflow-wrap:anywhere]">
        <a href={`#${id}`} className="underline-offset-4 hover:underline">
          {form}
        </a>
      </h3>
      <p className="max-w-prose">
        <Sentence text={meaning} />
      </p>
      {parameters.length > 0 && (
        <dl className="mt-1 max-w-prose text-small text-soft">
          {parameters.map(([name, text]) => (
            <div key={name} className="flex gap-2">
              <dt className="font-mono text-ink">{name}</dt>
              <dd>
                <Sentence text={text} />
              </dd>
            </div>
          ))}
        </dl>
      )}
      <div className="mt-2 border-l-2 border-rule pl-3">
        <div className="flex flex-wrap items-baseline justify-between gap-x-4">
          <pre className="whitespace-pre-wrap font-mono text-source [overflow-wrap:anywhere]">
            {sample}
          </pre>
          <div className="-ml-1.5 flex flex-wrap items-baseline gap-x-2">
            {signedIn && <PutIn lines={sample} name={form} />}
            <CopyButton
              look="quiet"
              text={sample}
              label="Copy"
              name={`Copy the sample of ${form}`}
            />
          </div>
        </div>
        {results.map((result) => (
          <SampleResult key={result.line} result={result} />
        ))}
      </div>
    </article>
  );
}
