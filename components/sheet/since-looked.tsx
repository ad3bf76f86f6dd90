'use client';

import Link from 'next/link';
import useSWR from 'swr';
import { askFor } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { Sentence } from '@/components/ui/sentence';
import type { Changes } from '@/lib/notebooks/types';

interface SinceLookedProps {
  notebookId: string;
  /** The version last looked at, and the newest. */
  from: number;
  to: number;
  onDismiss: () => void;
}

/** What others changed since one looked, in words; nothing when nobody else did. */
export function SinceLooked({ notebookId, from, to, onDismiss }: SinceLookedProps) {
  const { data } = useSWR<Changes>(
    from < to ? `/api/notebooks/${notebookId}/changes?from=${from}&to=${to}` : null,
    askFor<Changes>,
    { keepPreviousData: true, revalidateOnFocus: false },
  );
  if (from >= to || data === undefined || data.by.length === 0) return null;
  return (
    <Notice>
      Since you looked (version {data.from}): {listed(data.by)} <Sentence text={data.words} />.{' '}
      <Link
        href={`/notebooks/${notebookId}/compare?from=${data.from}&to=${data.to}`}
        className="text-snapline underline underline-offset-4"
      >
        Compare
      </Link>
      <Button look="quiet" onClick={onDismiss}>
        Seen
      </Button>
    </Notice>
  );
}

const listed = (names: readonly string[]) =>
  names.length < 2 ? names.join('') : `${names.slice(0, -1).join(', ')} and ${names.at(-1) ?? ''}`;
