import type { ReactNode } from 'react';
import { SheetFrame } from '@/components/drawing/sheet-frame';

interface SheetLayoutProps {
  index: ReactNode;
  children: ReactNode;
  foot: ReactNode;
  zones: number;
  /** On a narrow screen the index folds above the entries, or the page shows it elsewhere. */
  narrow?: 'above' | 'elsewhere';
}

/** The index beside the entries, within the border. */
export function SheetLayout({ index, children, foot, zones, narrow = 'above' }: SheetLayoutProps) {
  return (
    <SheetFrame foot={foot} zones={zones}>
      <div className="grid grow max-lg:content-start lg:grid-cols-[15rem_minmax(0,1fr)] print:block">
        <nav
          aria-label="Index of the sheet"
          className="border-rule max-lg:hidden lg:border-r print:hidden"
        >
          <div className="sticky top-0 max-h-dvh overflow-y-auto px-4 py-5">{index}</div>
        </nav>
        {narrow === 'above' && (
          <details className="border-b border-rule px-4 py-2 lg:hidden print:hidden">
            <summary className="text-small font-semibold">Marks and headings</summary>
            <nav aria-label="Index of the sheet" className="py-3">
              {index}
            </nav>
          </details>
        )}
        <div className="min-w-0 px-2 py-5 sm:px-4 print:py-0">{children}</div>
      </div>
    </SheetFrame>
  );
}

/** Zones enough for a sheet of so many cells; what is too many is cut off at the border. */
export function zonesFor(cells: number) {
  return Math.min(400, 8 + cells * 2);
}
