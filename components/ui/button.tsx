import Link from 'next/link';
import type { ButtonHTMLAttributes, ComponentProps } from 'react';

export type Look = 'main' | 'plain' | 'quiet' | 'warn';

const BASE =
  'inline-flex items-center justify-center gap-2 whitespace-nowrap rounded-cut text-small font-medium ' +
  'disabled:opacity-55 disabled:cursor-not-allowed print:hidden';

const LOOKS: Record<Look, string> = {
  main: 'bg-ruddle text-on-ruddle border border-ruddle px-3.5 min-h-9 hover:not-disabled:underline underline-offset-4',
  plain: 'border border-rule bg-sheet text-ink px-3 min-h-9 hover:not-disabled:border-ink',
  quiet: 'text-snapline px-1.5 min-h-7 hover:not-disabled:underline underline-offset-4',
  warn: 'border border-ruddle text-ruddle bg-sheet px-3 min-h-9 hover:not-disabled:bg-ruddle-wash',
};

type ButtonProps = ButtonHTMLAttributes<HTMLButtonElement> & { look?: Look };

export function Button({ look = 'plain', className = '', type = 'button', ...rest }: ButtonProps) {
  return <button type={type} className={`${BASE} ${LOOKS[look]} ${className}`} {...rest} />;
}

type LinkButtonProps = ComponentProps<typeof Link> & { look?: Look };

export function LinkButton({ look = 'plain', className = '', ...rest }: LinkButtonProps) {
  return <Link className={`${BASE} ${LOOKS[look]} ${className}`} {...rest} />;
}

type DownloadProps = ComponentProps<'a'> & { look?: Look };

/** A plain anchor: what it leads to is a file, not a page of ours. */
export function Download({ look = 'plain', className = '', children, ...rest }: DownloadProps) {
  return (
    <a download className={`${BASE} ${LOOKS[look]} ${className}`} {...rest}>
      {children}
    </a>
  );
}
