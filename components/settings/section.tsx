import { useId, type ReactNode } from 'react';

/** One part of the settings, under its heading. */
export function SettingsSection({ title, children }: { title: string; children: ReactNode }) {
  const id = useId();
  return (
    <section aria-labelledby={id} className="min-w-0 space-y-3">
      <h2 id={id} className="text-figure font-semibold">
        {title}
      </h2>
      {children}
    </section>
  );
}
