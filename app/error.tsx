'use client';

import { Card } from '@/components/site/card';
import { Button } from '@/components/ui/button';

interface ErrorPageProps {
  error: Error & { digest?: string };
  reset: () => void;
}

export default function ErrorPage({ error, reset }: ErrorPageProps) {
  return (
    <Card title="This page could not be drawn">
      <p>
        Something failed on our side. What was kept is safe on the server, and what was typed is
        still in this browser.
      </p>
      {error.digest && (
        <p className="text-small text-soft">
          Reference for whoever looks into it: <span className="font-mono">{error.digest}</span>
        </p>
      )}
      <Button look="main" onClick={reset}>
        Try again
      </Button>
    </Card>
  );
}
