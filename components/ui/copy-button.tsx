'use client';

import { useEffect, useState } from 'react';
import { Button } from './button';

interface CopyButtonProps {
  text: string;
  label: string;
}

export function CopyButton({ text, label }: CopyButtonProps) {
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
    <Button onClick={copy} aria-live="polite">
      {said ?? label}
    </Button>
  );
}
