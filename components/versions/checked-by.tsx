import type { CheckLine } from '@/lib/notebooks/types';

/** In a list of versions: who has checked this one. */
export function CheckedBy({ checks, number }: { checks: readonly CheckLine[]; number: number }) {
  const names = checks.filter(({ version }) => version === number).map(({ person }) => person.name);
  if (names.length === 0) return null;
  return <span className="block text-small text-lichen">checked by {names.join(', ')}</span>;
}
