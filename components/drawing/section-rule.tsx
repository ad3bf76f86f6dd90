import type { ReactNode } from 'react';

interface SectionRuleProps {
  children: ReactNode;
  /** The sign that folds the section, where it can be folded. */
  fold?: ReactNode;
  folded?: boolean;
  /** What a folded section hides, in words. */
  note?: string | null;
}

/** A heading of the sheet between rules that run to the margins, as a zone is divided off. */
export function SectionRule({ children, fold, folded = false, note = null }: SectionRuleProps) {
  return (
    <div
      className={`flex break-after-avoid items-center gap-2 border-b pb-1.5 pt-3 ${folded ? 'border-double border-b-4 border-rule' : 'border-rule'}`}
    >
      {fold}
      <h2 className="min-w-0 grow font-serif text-figure font-semibold [overflow-wrap:anywhere]">
        {children}
      </h2>
      {note && <span className="shrink-0 text-small text-soft">{note}</span>}
    </div>
  );
}
