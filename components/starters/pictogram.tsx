import type { Starter } from './sheets';

/** Middle of the drawing, which is 96 units square. */
const O = 48;

/** A point at a part of a turn from the top, clockwise, so far from the middle. */
function at(part: number, radius: number): string {
  const angle = 2 * Math.PI * part;
  const x = O + radius * Math.sin(angle);
  const y = O - radius * Math.cos(angle);
  return `${x.toFixed(2)} ${y.toFixed(2)}`;
}

const parts = (count: number) => Array.from({ length: count }, (_, index) => index / count);

const circle = (radius: number) =>
  `M${at(0, radius)}A${radius} ${radius} 0 0 1 ${at(0.5, radius)}A${radius} ${radius} 0 0 1 ${at(1, radius)}`;

const radials = (count: number, from: number, to: number) =>
  parts(count)
    .map((part) => `M${at(part + 0.5 / count, from)}L${at(part + 0.5 / count, to)}`)
    .join('');

/** Circles of a radius with their middles on a circle about O. */
const ringOfCircles = (count: number, ring: number, radius: number) =>
  parts(count)
    .map((part) => {
      const [x = '', y = ''] = at(part, ring).split(' ');
      return `M${x} ${Number(y) - radius}a${radius} ${radius} 0 1 1 -0.01 0Z`;
    })
    .join('');

const polygon = (count: number, radius: number) =>
  `M${parts(count)
    .map((part) => at(part + 0.5 / count, radius))
    .join('L')}Z`;

interface Drawing {
  /** What the starter is about, in full lines. */
  strong: string;
  /** What it is derived from: circles, centre lines. */
  fine: string;
  /** The one piece that is cut. */
  piece: string;
}

function wedge(count: number, inner: number, outer: number): string {
  const half = 0.5 / count;
  return `M${at(-half, inner)}L${at(-half, outer)}L${at(half, outer)}L${at(half, inner)}Z`;
}

const DRAWINGS: Record<Starter['name'], Drawing> = {
  voussoirs: {
    strong: circle(42) + circle(28) + radials(11, 28, 42),
    fine: `M${at(0, 47)}L${at(0.5, 47)}M${at(0.25, 47)}L${at(0.75, 47)}`,
    piece: wedge(11, 28, 42),
  },
  tracery: {
    strong: circle(44) + ringOfCircles(8, 29, 10) + circle(15),
    fine: circle(29),
    piece: ringOfCircles(1, 29, 10),
  },
  pavement: {
    strong: [44, 33, 22, 11].map((radius) => polygon(15, radius)).join('') + radials(15, 11, 44),
    fine: circle(44),
    piece: wedge(15, 33, 44),
  },
};

/** A small drawing of what a starter sets out. */
export function Pictogram({ name }: { name: Starter['name'] }) {
  const { strong, fine, piece } = DRAWINGS[name];
  return (
    <svg viewBox="0 0 96 96" className="size-full" aria-hidden="true" focusable="false">
      <path d={piece} className="fill-ruddle-wash stroke-ruddle" strokeWidth="2" />
      <path
        d={fine}
        className="fill-none stroke-rule"
        strokeWidth="0.75"
        strokeDasharray="6 2 1 2"
      />
      <path d={strong} className="fill-none stroke-ink" strokeWidth="1.25" />
      <path d={piece} className="fill-none stroke-ruddle" strokeWidth="2" />
    </svg>
  );
}
