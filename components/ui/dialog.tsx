'use client';

import { useEffect, useId, useRef, type ReactNode } from 'react';
import { Button } from './button';

interface DialogProps {
  title: string;
  onClose: () => void;
  children: ReactNode;
  /** Wide dialogs hold comparisons; others keep to a column that reads well. */
  wide?: boolean;
  /** Only read: the text itself takes the focus, so that the arrows move it. */
  reading?: boolean;
}

/** The browser's own modal dialog: it holds the focus, closes on Escape and gives the focus back. */
export function Dialog({ title, onClose, children, wide = false, reading = false }: DialogProps) {
  const box = useRef<HTMLDialogElement>(null);
  const heading = useId();
  /** What had the focus before; an effect that runs a second time must not take the dialog for it. */
  const opener = useRef<Element | null>(null);

  useEffect(() => {
    const dialog = box.current;
    const before = (opener.current ??= document.activeElement);
    if (dialog && !dialog.open) dialog.showModal();
    // Of itself the browser would choose the first button, which closes.
    dialog?.querySelector<HTMLElement>('input, select, textarea, [data-reading]')?.focus();
    return () => {
      if (before instanceof HTMLElement && before.isConnected) before.focus();
    };
  }, []);

  return (
    <dialog
      ref={box}
      aria-labelledby={heading}
      onClose={onClose}
      onCancel={(event) => {
        event.preventDefault();
        onClose();
      }}
      onKeyDown={(event) => event.stopPropagation()}
      className={`m-auto w-[calc(100vw-1.5rem)] border-2 border-ink bg-sheet p-0 text-ink ${
        wide ? 'max-w-4xl' : 'max-w-xl'
      }`}
    >
      <div className="flex items-center justify-between gap-4 border-b border-rule px-5 py-2.5">
        <h2 id={heading} className="text-figure font-semibold">
          {title}
        </h2>
        <Button look="quiet" onClick={onClose}>
          Close
        </Button>
      </div>
      <div
        className="max-h-[75dvh] space-y-4 overflow-y-auto px-5 py-4"
        {...(reading
          ? { tabIndex: 0, role: 'group', 'aria-labelledby': heading, 'data-reading': '' }
          : {})}
      >
        {children}
      </div>
    </dialog>
  );
}
