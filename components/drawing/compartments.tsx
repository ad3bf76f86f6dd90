import type { ReactNode } from 'react';
import { Spoken } from '@/components/ui/spoken';

export interface Compartment {
  label: string;
  value: ReactNode;
  tone?: 'plain' | 'reached' | 'approximate' | 'fault';
  /** Figures stand in the monospace. */
  figures?: boolean;
  /** The value in words, for whoever listens, where its signs would be misread. */
  spoken?: string;
}

const TONES = {
  plain: '',
  reached: 'bg-lichen-wash text-lichen font-semibold',
  approximate: 'bg-ochre-wash text-ochre font-semibold',
  fault: 'bg-ruddle-wash text-ruddle font-semibold',
} as const;

/** Compasses open on a baseline: this value is reached. */
export function ReachedSign() {
  return (
    <svg viewBox="0 0 16 16" className="mr-1.5 inline size-3.5 align-[-2px]" aria-hidden="true">
      <path
        d="M8 1.5v2M8 3.5L3.5 14M8 3.5L12.5 14M5 10.5a8 8 0 0 0 6 0"
        fill="none"
        stroke="currentColor"
        strokeWidth="1.4"
      />
    </svg>
  );
}

/** A gap in a line: this value is approached, not reached. */
export function ApproximateSign() {
  return (
    <svg viewBox="0 0 16 16" className="mr-1.5 inline size-3.5 align-[-2px]" aria-hidden="true">
      <path d="M1 11h5M10 11h5M6 7v8M10 7v8" fill="none" stroke="currentColor" strokeWidth="1.4" />
    </svg>
  );
}

/** The strip of small ruled compartments under a value. */
export function Compartments({ items }: { items: readonly Compartment[] }) {
  if (items.length === 0) return null;
  return (
    <dl className="flex flex-wrap pl-px pt-px text-small">
      {items.map(({ label, value, tone = 'plain', figures, spoken }) => (
        <div
          key={label}
          className={`-ml-px -mt-px min-w-0 max-w-[calc(100%+1px)] shrink-0 border border-hairline px-2.5 pb-1 pt-0.5 ${TONES[tone]}`}
        >
          <dt className="text-tag font-normal text-soft">{label}</dt>
          <dd className={`break-words ${figures ? 'font-mono [overflow-wrap:anywhere]' : ''}`}>
            {tone === 'reached' && <ReachedSign />}
            {tone === 'approximate' && <ApproximateSign />}
            <Spoken words={spoken}>{value}</Spoken>
          </dd>
        </div>
      ))}
    </dl>
  );
}
