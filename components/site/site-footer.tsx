import type { Theme } from '@/components/ui/theme';
import { ThemeSwitch } from '@/components/ui/theme-switch';

export function SiteFooter({ theme }: { theme: Theme }) {
  return (
    <footer className="mx-auto mt-8 flex w-full max-w-sheet flex-wrap items-center justify-between gap-x-6 gap-y-1 px-3 py-4 sm:px-6 print:hidden">
      <p className="text-small text-soft">
        Exact numbers do not make a structure safe. Local codes and licensed practice decide.
      </p>
      <ThemeSwitch initial={theme} />
    </footer>
  );
}
