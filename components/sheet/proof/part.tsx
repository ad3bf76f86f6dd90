import { useId, type ReactNode } from 'react';

/** One ruled part of the proof: its name in the margin of the heading, and what is proven. */
export function Part({ title, children }: { title: string; children: ReactNode }) {
  const id = useId();
  return (
    <section
      aria-labelledby={id}
      className="border-t border-rule pb-4 pt-2 first:border-t-0 first:pt-0"
    >
      <h3 id={id} className="mb-1.5 text-tag text-soft">
        {title}
      </h3>
      {children}
    </section>
  );
}

/** What may be wider than the drawer scrolls within its own box, by keyboard too. */
export function Wide({ label, children }: { label: string; children: ReactNode }) {
  return (
    <div
      role="group"
      aria-label={label}
      tabIndex={0}
      className="scroll-hint -ml-1 overflow-x-auto overflow-y-hidden py-1 pl-1"
    >
      {children}
    </div>
  );
}
