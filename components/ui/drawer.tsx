'use client';

import { useEffect, useId, useRef, type ReactNode } from 'react';
import { Button } from './button';

interface DrawerProps {
  title: ReactNode;
  /** The caller gives the focus back to where the drawer was opened. */
  onClose: () => void;
  /** The side of a wide screen at which it stands. */
  side?: 'left' | 'right';
  children: ReactNode;
}

/** From this width on a drawer stands beside the page, which stays usable; below, it lies over its foot. */
const BESIDE = '(min-width: 64rem)';

const SIDES = {
  right: 'lg:left-auto lg:right-0 lg:border-l-2',
  left: 'lg:left-0 lg:right-auto lg:border-r-2',
} as const;

/** A panel at the side of a wide screen and at the foot of a narrow one; Escape closes it. */
export function Drawer({ title, onClose, side = 'right', children }: DrawerProps) {
  const box = useRef<HTMLDialogElement>(null);
  const heading = useRef<HTMLHeadingElement>(null);
  const headingId = useId();

  useEffect(() => {
    const dialog = box.current;
    if (dialog && !dialog.open) {
      if (window.matchMedia(BESIDE).matches) dialog.show();
      else dialog.showModal();
    }
    heading.current?.focus();
    return () => dialog?.close();
  }, []);

  // A press on nothing leaves the focus nowhere; Escape closes the drawer all the same.
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      const nowhere = document.activeElement === document.body;
      if (event.key === 'Escape' && nowhere && !event.defaultPrevented) onClose();
    };
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, [onClose]);

  return (
    <dialog
      ref={box}
      aria-labelledby={headingId}
      onCancel={(event) => {
        event.preventDefault();
        onClose();
      }}
      onKeyDown={(event) => {
        event.stopPropagation();
        if (event.key !== 'Escape' || event.defaultPrevented) return;
        event.preventDefault();
        onClose();
      }}
      className={`fixed z-30 m-0 flex max-h-none max-w-none flex-col border-ink bg-sheet p-0 text-ink max-lg:inset-x-0 max-lg:bottom-0 max-lg:top-auto max-lg:max-h-[85dvh] max-lg:w-full max-lg:border-t-2 lg:inset-y-0 lg:h-dvh lg:w-[29rem] print:hidden ${SIDES[side]}`}
    >
      <div className="flex items-center justify-between gap-4 border-b-2 border-ink px-5 py-2">
        <h2
          id={headingId}
          ref={heading}
          tabIndex={-1}
          className="min-w-0 text-figure font-semibold"
        >
          {title}
        </h2>
        <Button look="quiet" onClick={onClose}>
          Close
        </Button>
      </div>
      <div className="min-h-0 grow overflow-y-auto overscroll-contain px-5 py-4">{children}</div>
    </dialog>
  );
}
