import { LinkButton } from '@/components/ui/button';
import { FrontExample } from '@/components/front/front-example';
import { currentPerson } from '@/lib/accounts/session';

const POINTS = [
  [
    'Says what can be struck',
    'Which figures straightedge and compass reach exactly, and which they only approach.',
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

export default async function FrontPage() {
  const person = await currentPerson();
  return (
    <div className="mx-auto grid max-w-sheet items-start gap-8 lg:grid-cols-[minmax(0,5fr)_minmax(0,6fr)] lg:pt-4">
      <div className="space-y-6">
        <h1 className="font-serif text-title font-semibold text-balance">
          Lengths you can strike, right to the last rounding
        </h1>
        <p className="max-w-prose font-serif text-note">
          Setting-out offices in stone, joinery, leaded glass, tile and metal turn a design into
          lengths that are struck full size, cut, and checked on site. Surdwork keeps that work in
          shared notebooks and evaluates it exactly, in + − × ÷ √, so that nothing is lost before
          the saw.
        </p>
        <div className="flex flex-wrap gap-2">
          {person ? (
            <LinkButton look="main" href="/notebooks">
              To my notebooks
            </LinkButton>
          ) : (
            <>
              <LinkButton look="main" href="/sign-in">
                Sign in
              </LinkButton>
              <LinkButton href="/sign-up">Make an account</LinkButton>
            </>
          )}
        </div>
        <dl className="grid max-w-prose gap-x-8 gap-y-4 sm:grid-cols-2">
          {POINTS.map(([title, text]) => (
            <div key={title} className="border-t-2 border-ink pt-1.5">
              <dt className="font-semibold">{title}</dt>
              <dd className="text-small text-soft">{text}</dd>
            </div>
          ))}
        </dl>
      </div>
      <FrontExample />
    </div>
  );
}
