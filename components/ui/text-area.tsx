'use client';

import { useId, type TextareaHTMLAttributes } from 'react';

interface TextAreaProps extends TextareaHTMLAttributes<HTMLTextAreaElement> {
  label: string;
  hint?: string;
}

/** A field of several lines. */
export function TextArea({ label, hint, ...rest }: TextAreaProps) {
  const id = useId();
  return (
    <div className="space-y-1">
      <label htmlFor={id} className="block text-small font-medium">
        {label}
      </label>
      <textarea
        id={id}
        aria-describedby={hint ? `${id}-hint` : undefined}
        className="block w-full rounded-cut border border-rule bg-sheet px-3 py-1.5 text-base text-ink placeholder:text-soft"
        {...rest}
      />
      {hint && (
        <p id={`${id}-hint`} className="text-small text-soft">
          {hint}
        </p>
      )}
    </div>
  );
}
