/** More corners than this cannot be told apart in a drawing of this size. */
const MOST_CORNERS = 120;
const R = 90;

/** The circle with its points and its polygon. Pixels may be drawn in floating point: nothing is measured off them. */
export function PolygonFigure({ parts }: { parts: number }) {
  const drawn = parts <= MOST_CORNERS;
  const points = Array.from({ length: drawn ? parts : 0 }, (_, k) => {
    const angle = (2 * Math.PI * k) / parts;
    return [R * Math.cos(angle), -R * Math.sin(angle)].map((x) => x.toFixed(2)) as [string, string];
  });
  return (
    <figure className="mx-auto w-full max-w-60">
      <svg viewBox="-100 -100 200 200" aria-hidden="true" className="w-full">
        <circle r={R} fill="none" className="stroke-rule" strokeWidth="0.75" />
        <path d="M-98 0H98M0 -98V98" className="stroke-hairline" strokeWidth="0.5" />
        <polygon
          points={points.map((point) => point.join(',')).join(' ')}
          fill="none"
          className="stroke-ink"
          strokeWidth="1.5"
          strokeLinejoin="round"
        />
        {points.map(([x, y], k) => (
          <circle key={k} cx={x} cy={y} r={k === 0 ? 3 : 1.75} className="fill-ruddle" />
        ))}
      </svg>
      <figcaption className="text-center text-small text-soft">
        {drawn ? 'Not to scale; the datum points to the right.' : 'Too many points to draw.'}
      </figcaption>
    </figure>
  );
}
