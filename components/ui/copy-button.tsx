'use client';

import { useEffect, useState } from 'react';
import { Button, type Look } from './button';

interface CopyButtonProps {
  text: string;
  label: string;
  look?: Look;
  /** What a screen reader calls it, where the label alone does not say what is copied. */
  name?: string;
}

export function CopyButton({ text, label, look = 'plain', name }: CopyButtonProps) {
  const [said, setSaid] = useState<string | null>(null);

  useEffect(() => {
    if (said === null) return;
    const timer = setTimeout(() => setSaid(null), 2000);
    return () => clearTimeout(timer);
  }, [said]);

  const copy = () => {
    navigator.clipboard.writeText(text).then(
      () => setSaid('Copied'),
      () => setSaid('The browser refused; select and copy by hand'),
    );
  };

  return (
    <Button
      look={look}
      onClick={copy}
      aria-live="polite"
      aria-label={said === null ? name : undefined}
    >
      {said ?? label}
    </Button>
  );
}
