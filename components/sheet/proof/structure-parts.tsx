import { Compartments } from '@/components/drawing/compartments';
import { Sentence } from '@/components/ui/sentence';
import { Tex } from '@/components/ui/tex';
import type { Result } from '../result';
import { polynomialTex, stepTex } from '../value-tex';
import { sayUnit, type NumberResult } from '../say-number';
import { shortenUp } from '../wording';
import { reachCompartments, sayGuarantee } from './say-proof';
import { Part, Wide } from './part';

/** More than this is no reading any more; the text stands there instead of the typeset form. */
const LONGEST_TYPESET = 6000;

function omission(result: NumberResult, field: string): string | null {
  return result.omitted?.find((left) => left.field === field)?.message ?? null;
}

/** The cut size with the guarantee that its rounding gives. */
export function CutPart({ result }: { result: NumberResult }) {
  const { cut, unit } = result;
  if (!cut || unit === null) return null;
  return (
    <Part title="Cut size">
      <p className="text-figure font-medium tabular-nums">{`${cut.value} ${sayUnit(unit)}`}</p>
      <p className="mt-1 text-base">{sayGuarantee(cut)}</p>
    </Part>
  );
}

/** Which tools reach the value, each by itself, and why. */
export function ReachPart({ reach }: { reach: NumberResult['reach'] }) {
  return (
    <Part title="Reach">
      <Compartments items={reachCompartments(reach)} />
      <p className="mt-1.5 text-base">
        <Sentence text={reach.reason} />
      </p>
    </Part>
  );
}

/** Degree and minimal polynomial of the number of units. */
export function PolynomialPart({ result }: { result: NumberResult }) {
  const { degree, minimalPolynomial: coefficients } = result;
  const left = omission(result, 'minimalPolynomial') ?? omission(result, 'degree');
  const text = coefficients === null ? '' : polynomialTex(coefficients);
  return (
    <Part title="Degree and minimal polynomial">
      <p className="text-base">
        {degree === null
          ? (left ??
            'Transcendental: no polynomial with whole coefficients has this value as a root.')
          : `Degree ${degree} over the rational numbers.`}
      </p>
      {coefficients !== null && (
        <Wide label="Minimal polynomial">
          {text.length > LONGEST_TYPESET ? (
            <code className="whitespace-nowrap font-mono text-small">
              {coefficients.join(', ')}
            </code>
          ) : (
            <span className="whitespace-nowrap text-base">
              <Tex tex={`${text}=0`} />
            </span>
          )}
        </Wide>
      )}
      {degree !== null && left !== null && <p className="text-small text-soft">{left}</p>}
      {result.unit !== null && degree !== null && (
        <p className="text-small text-soft">{`x counts ${sayUnit(result.unit)}.`}</p>
      )}
    </Part>
  );
}

/** The square roots that build the value, lowest first: each is the root of a named quadratic. */
export function TowerPart({ result }: { result: NumberResult }) {
  const { tower } = result;
  const left = omission(result, 'tower');
  if (tower === null || tower.length === 0) {
    const words =
      left ??
      (tower === null
        ? 'Square roots alone do not build this value.'
        : 'A rational number: no square root is needed.');
    return (
      <Part title="Tower">
        <p className="text-base">{words}</p>
      </Part>
    );
  }
  return (
    <Part title={`Tower, ${tower.length === 1 ? '1 root' : `${tower.length} roots`}`}>
      <Wide label="Roots, lowest first">
        <ol className="space-y-1.5 whitespace-nowrap text-base">
          {tower.map((step) => (
            <li key={step.name}>
              <Tex tex={stepTex(step)} />
            </li>
          ))}
        </ol>
      </Wide>
    </Part>
  );
}

type StandIn = NonNullable<NumberResult['standIn']>;
type Offer = StandIn['others'][number];

const SIDES = { above: 'above', below: 'below', level: 'either way', exact: '' } as const;

function OfferRow({ offer, unit }: { offer: Offer; unit: string }) {
  const { text, how, source, error, strikes } = offer;
  const off =
    error.direction === 'exact'
      ? 'exact'
      : `within ${shortenUp(error.bound, 4)}${unit} ${SIDES[error.direction]}`;
  return (
    <li className="border-b border-hairline py-2">
      <code className="font-mono text-source [overflow-wrap:anywhere]">{text}</code>
      <p className="text-small">
        {off} · {strikes.total} strikes
      </p>
      <p className="text-small text-soft">
        {how}
        {source !== null && ` (${source})`}
      </p>
    </li>
  );
}

/** What can be struck instead, within the tolerance that was asked for. */
export function StandInPart({ result }: { result: Extract<Result, { standIn?: StandIn }> }) {
  const { standIn } = result;
  if (standIn === undefined) return null;
  const unit = result.kind === 'number' ? ` ${sayUnit(result.unit ?? '')}`.trimEnd() : '°';
  return (
    <Part title="Stand-ins">
      <p className="text-base">
        <Sentence text={`For \`${standIn.of}\`, within \`${standIn.tolerance}\`.`} />
      </p>
      <ul className="mt-1 border-t border-hairline">
        {[standIn, ...standIn.others].map((offer) => (
          <OfferRow key={offer.text} offer={offer} unit={unit} />
        ))}
      </ul>
    </Part>
  );
}
