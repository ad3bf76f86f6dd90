import { headers } from 'next/headers';
import { SheetFrame } from '@/components/drawing/sheet-frame';
import { TitleBlock } from '@/components/drawing/title-block';
import { LiveCell } from '@/components/front/live-cell';
import { trialFor } from '@/components/front/tried';
import { LinkButton } from '@/components/ui/button';
import { addressOf } from '@/lib/accounts';
import { currentPerson } from '@/lib/accounts/session';
import { TRIAL_SETTINGS } from '@/lib/notebooks/trial-limits';

const POINTS = [
  [
    'Says what can be struck',
    'Which figures straightedge and compass reach exactly and which they only come near.',
  ],
  [
    'Rounds once, and says which way',
    'Cut sizes to your step, up, down or exact, from the value itself.',
  ],
  [
    'Decides, never guesses',
    'Two routes to one length are equal or they are not; no decimal has a say.',
  ],
  [
    'Hands over safely',
    'Architect, client and saw read and export each version; none can change it.',
  ],
] as const;

interface PageProps {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export default async function FrontPage({ searchParams }: PageProps) {
  const { lines } = await searchParams;
  const [person, first] = await Promise.all([
    currentPerson(),
    trialFor(typeof lines === 'string' ? lines : null, addressOf(await headers())),
  ]);
  return (
    <div className="mx-auto grid max-w-sheet items-start gap-x-10 gap-y-7 lg:grid-cols-[minmax(0,5fr)_minmax(0,7fr)] lg:grid-rows-[auto_1fr] lg:pt-3">
      <div className="space-y-5">
        <h1 className="font-serif text-title font-semibold text-balance">
          Lengths you can strike, right to the last rounding
        </h1>
        <p className="max-w-prose font-serif text-note">
          For setting-out offices in stone, joinery, leaded glass, tile and metal. Surdwork keeps
          the geometry of a job in shared notebooks and works it out exactly, in + − × ÷ √, so that
          what is struck full size, cut and checked on site is the figure that was meant.
        </p>
        <div className="flex flex-wrap gap-2">
          {person ? (
            <LinkButton look="main" href="/notebooks">
              To my notebooks
            </LinkButton>
          ) : (
            <>
              <LinkButton look="main" href="/sign-up">
                Make an account
              </LinkButton>
              <LinkButton href="/sign-in">Sign in</LinkButton>
            </>
          )}
        </div>
      </div>
      <section
        aria-label="Try a cell"
        className="min-w-0 lg:col-start-2 lg:row-span-2 lg:row-start-1"
      >
        <SheetFrame
          zones={10}
          short
          foot={
            <TitleBlock
              fields={[
                { label: 'Title', value: 'Try it: nothing is kept', span: 6, strong: true },
                { label: 'Unit', value: TRIAL_SETTINGS.unit, span: 3 },
                { label: 'Cutting step', value: TRIAL_SETTINGS.step, span: 3 },
              ]}
            />
          }
        >
          <LiveCell first={first} />
        </SheetFrame>
      </section>
      <dl className="grid max-w-prose gap-x-8 gap-y-4 sm:grid-cols-2">
        {POINTS.map(([title, text]) => (
          <div key={title} className="border-t-2 border-ink pt-1.5">
            <dt className="font-semibold">{title}</dt>
            <dd className="text-small text-soft">{text}</dd>
          </div>
        ))}
      </dl>
    </div>
  );
}
