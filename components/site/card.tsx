import type { ReactNode } from 'react';

interface CardProps {
  title: string;
  children: ReactNode;
}

/** A small sheet of its own in the middle of the page: signing in, a message. */
export function Card({ title, children }: CardProps) {
  return (
    <div className="mx-auto mt-6 w-full max-w-md border border-rule bg-sheet p-1.5 sm:mt-12">
      <div className="space-y-5 border-2 border-ink px-5 py-6">
        <h1 className="font-serif text-head font-semibold">{title}</h1>
        {children}
      </div>
    </div>
  );
}
