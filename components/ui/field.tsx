'use client';

import { useId, type InputHTMLAttributes, type ReactNode, type SelectHTMLAttributes } from 'react';

interface Labelled {
  label: string;
  hint?: ReactNode;
  fault?: string | null;
}

const BOX =
  'w-full min-h-10 rounded-cut border bg-sheet px-3 py-1.5 text-base text-ink placeholder:text-soft';
const edge = (fault?: string | null) => (fault ? 'border-ruddle' : 'border-rule');

function Surround({
  id,
  label,
  hint,
  fault,
  children,
}: Labelled & { id: string; children: ReactNode }) {
  return (
    <div className="space-y-1">
      <label htmlFor={id} className="block text-small font-medium">
        {label}
      </label>
      {children}
      {hint && (
        <p id={`${id}-hint`} className="text-small text-soft">
          {hint}
        </p>
      )}
      {fault && (
        <p id={`${id}-fault`} className="text-small font-medium text-ruddle">
          {fault}
        </p>
      )}
    </div>
  );
}

function describedBy(id: string, { hint, fault }: Labelled) {
  const parts = [hint && `${id}-hint`, fault && `${id}-fault`].filter(Boolean);
  return parts.length > 0 ? parts.join(' ') : undefined;
}

export function Field({
  label,
  hint,
  fault,
  className = '',
  ...rest
}: Labelled & InputHTMLAttributes<HTMLInputElement>) {
  const id = useId();
  return (
    <Surround id={id} label={label} hint={hint} fault={fault}>
      <input
        id={id}
        className={`${BOX} ${edge(fault)} ${className}`}
        aria-invalid={fault ? true : undefined}
        aria-describedby={describedBy(id, { label, hint, fault })}
        {...rest}
      />
    </Surround>
  );
}

export function Choice({
  label,
  hint,
  fault,
  className = '',
  children,
  ...rest
}: Labelled & SelectHTMLAttributes<HTMLSelectElement>) {
  const id = useId();
  return (
    <Surround id={id} label={label} hint={hint} fault={fault}>
      <select
        id={id}
        className={`${BOX} ${edge(fault)} ${className}`}
        aria-invalid={fault ? true : undefined}
        aria-describedby={describedBy(id, { label, hint, fault })}
        {...rest}
      >
        {children}
      </select>
    </Surround>
  );
}
