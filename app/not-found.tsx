import type { Metadata } from 'next';
import { Card } from '@/components/site/card';
import { PageShell } from '@/components/site/page-shell';
import { LinkButton } from '@/components/ui/button';

export const metadata: Metadata = { title: 'Not found' };

export default function NotFound() {
  return (
    <PageShell who="guest">
      <Card title="There is no such sheet here">
        <p>
          The address leads nowhere: it may be incomplete, the sheet may not be shared with you, or
          a client link may have been revoked. Ask whoever gave it to you for a new one.
        </p>
        <LinkButton href="/">To the front page</LinkButton>
      </Card>
    </PageShell>
  );
}
