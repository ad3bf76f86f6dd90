import { Spoken } from '@/components/ui/spoken';

interface DimensionLineProps {
  /** What stands on the line: figure and unit. */
  figure: string;
  /** What stands below it: how the figure was rounded. */
  below: string;
  /** The figure in words. */
  spoken?: string;
  greyed?: boolean;
}

/** A drawn dimension: extension lines, a line between them and oblique ticks where they meet. */
export function DimensionLine({ figure, below, spoken, greyed = false }: DimensionLineProps) {
  return (
    <figure className={`w-full text-center ${greyed ? 'opacity-55' : ''}`}>
      <div className="font-sans text-figure font-medium tabular-nums">
        <Spoken words={spoken}>{figure}</Spoken>
      </div>
      <svg
        viewBox="0 0 200 16"
        className="h-4 w-full"
        preserveAspectRatio="none"
        aria-hidden="true"
        focusable="false"
      >
        <path
          d="M0 8H200M5 1V15M195 1V15"
          className="stroke-ink"
          strokeWidth="1"
          vectorEffect="non-scaling-stroke"
        />
        <path
          d="M1 13L9 3M191 13L199 3"
          className="stroke-ruddle"
          strokeWidth="2.25"
          vectorEffect="non-scaling-stroke"
        />
      </svg>
      <figcaption className="text-small text-soft">{below}</figcaption>
    </figure>
  );
}
