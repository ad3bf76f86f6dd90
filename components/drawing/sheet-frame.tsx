import { memo, type ReactNode } from 'react';
import { ZONE_REM, zoneLetter } from './zones';

interface SheetFrameProps {
  children: ReactNode;
  /** The title block, at the foot. */
  foot?: ReactNode;
  /** About how many rows of zones the sheet may be tall; too many costs nothing. */
  zones?: number;
  /** As tall as what is on it, instead of filling the screen. */
  short?: boolean;
}

function Centring({ className }: { className: string }) {
  return <span aria-hidden="true" className={`absolute bg-ink print:hidden ${className}`} />;
}

/** The letters along both sides; drawn anew only when there are more of them, not at each keystroke. */
const ZoneStrips = memo(function ZoneStrips({ zones }: { zones: number }) {
  return (
    <>
      {(['left-0', 'right-0'] as const).map((side) => (
        <div
          key={side}
          aria-hidden="true"
          className={`absolute inset-y-zone w-zone select-none overflow-hidden text-tag tracking-normal text-soft max-sm:hidden print:hidden ${side}`}
        >
          {Array.from({ length: zones }, (_, index) => (
            <span
              key={index}
              className="flex items-center justify-center border-b border-hairline"
              style={{ height: `${ZONE_REM}rem` }}
            >
              {zoneLetter(index)}
            </span>
          ))}
        </div>
      ))}
    </>
  );
});

/**
 * The sheet itself: trimmed edge, zone letters and figures, ruled border with centring marks, and
 * the title block in its lower right corner. On paper the border is that of each page, the title
 * block stands at the foot of every page, and an unseen copy of it keeps its place free.
 */
export function SheetFrame({ children, foot, zones = 40, short = false }: SheetFrameProps) {
  return (
    <div
      data-sheet
      className="relative border border-rule bg-sheet sm:px-zone print:static print:border-0 print:p-0"
    >
      <div
        aria-hidden="true"
        className="flex h-zone select-none items-center text-tag tracking-normal text-soft print:hidden"
      >
        {Array.from({ length: 8 }, (_, index) => (
          <span
            key={index}
            className={`flex-1 text-center ${index > 3 ? 'max-sm:hidden' : ''} ${index > 0 ? 'border-l border-hairline' : ''}`}
          >
            {index + 1}
          </span>
        ))}
      </div>
      <ZoneStrips zones={zones} />
      <div
        className={`relative flex flex-col border-2 border-ink max-sm:border-x-0 print:static print:table print:w-full print:border-0 ${short ? '' : 'min-h-[60vh] print:min-h-0'}`}
      >
        <Centring className="-top-2.5 left-1/2 h-2.5 w-0.5 -translate-x-1/2" />
        <Centring className="-bottom-2.5 left-1/2 h-2.5 w-0.5 -translate-x-1/2" />
        <Centring className="-left-2.5 top-1/2 h-0.5 w-2.5 max-sm:hidden" />
        <Centring className="-right-2.5 top-1/2 h-0.5 w-2.5 max-sm:hidden" />
        <div
          aria-hidden="true"
          className="hidden break-inside-avoid print:table-header-group print:[&>div]:h-4"
        >
          <div />
        </div>
        <div className="flex grow flex-col print:table-row-group">{children}</div>
        {foot && (
          <>
            <div className="print:fixed print:inset-x-0 print:bottom-0">{foot}</div>
            <div
              aria-hidden="true"
              className="hidden break-inside-avoid print:invisible print:table-footer-group"
            >
              {foot}
            </div>
          </>
        )}
      </div>
      <div aria-hidden="true" className="h-zone print:hidden" />
    </div>
  );
}
