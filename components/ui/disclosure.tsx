'use client';

import { useEffect, useId, useRef, useState, type ReactNode } from 'react';

interface DisclosureProps {
  label: ReactNode;
  /** What a screen reader calls the button when its label is a sign. */
  name?: string;
  /** Buttons and links; pressing one closes the list. */
  children: ReactNode;
  className?: string;
}

/** A button that opens a small list beneath itself; Escape, a choice or leaving it closes it. */
export function Disclosure({ label, name, children, className = '' }: DisclosureProps) {
  const [open, setOpen] = useState(false);
  const root = useRef<HTMLDivElement>(null);
  const button = useRef<HTMLButtonElement>(null);
  const listId = useId();

  useEffect(() => {
    if (!open) return;
    const outside = (event: PointerEvent) => {
      if (!root.current?.contains(event.target as Node)) setOpen(false);
    };
    document.addEventListener('pointerdown', outside);
    return () => document.removeEventListener('pointerdown', outside);
  }, [open]);

  return (
    <div
      ref={root}
      className="relative print:hidden"
      onBlur={(event) => {
        if (event.relatedTarget && !root.current?.contains(event.relatedTarget)) setOpen(false);
      }}
      onKeyDown={(event) => {
        if (event.key !== 'Escape' || !open) return;
        event.stopPropagation();
        setOpen(false);
        button.current?.focus();
      }}
    >
      <button
        ref={button}
        type="button"
        aria-expanded={open}
        aria-controls={open ? listId : undefined}
        aria-label={name}
        onClick={() => setOpen(!open)}
        className={className}
      >
        {label}
      </button>
      {open && (
        <div
          id={listId}
          onClick={() => {
            setOpen(false);
            button.current?.focus();
          }}
          className="absolute right-0 z-20 mt-1 min-w-64 border max-sm:fixed max-sm:inset-x-3 border-ink bg-sheet py-1 text-small shadow-[3px_3px_0_var(--hairline)]"
        >
          {children}
        </div>
      )}
    </div>
  );
}

export const DISCLOSURE_ROW =
  'flex w-full items-baseline justify-between gap-4 px-3 py-1.5 text-left hover:bg-snapline-wash focus-visible:bg-snapline-wash';
