import { Notice } from '@/components/ui/notice';

/** Said boldly over a revision that a newer one has replaced. */
export function Superseded({ letter, by }: { letter: string; by: string }) {
  return (
    <Notice tone="fault" title={`Superseded by revision ${by}`}>
      Do not cut or build from revision {letter}: a newer one has been issued in its place.
    </Notice>
  );
}
