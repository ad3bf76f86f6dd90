import type { ReactNode } from 'react';

const TONES = {
  plain: 'border-rule bg-sheet',
  good: 'border-lichen bg-lichen-wash',
  caution: 'border-ochre bg-ochre-wash',
  fault: 'border-ruddle bg-ruddle-wash',
} as const;

interface NoticeProps {
  tone?: keyof typeof TONES;
  title?: string;
  children?: ReactNode;
}

/** A sentence that matters now. Faults are announced at once, the rest when the reader pauses. */
export function Notice({ tone = 'plain', title, children }: NoticeProps) {
  return (
    <div
      role={tone === 'fault' ? 'alert' : 'status'}
      className={`border border-l-4 px-4 py-2.5 text-base ${TONES[tone]}`}
    >
      {title && <p className="font-semibold">{title}</p>}
      {children}
    </div>
  );
}
