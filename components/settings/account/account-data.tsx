'use client';

import { useState } from 'react';
import { Button, Download } from '@/components/ui/button';
import { DeleteDialog } from './delete-dialog';

interface AccountDataProps {
  email: string;
  hasPassword: boolean;
}

/** Taking one's data along, and leaving for good. */
export function AccountData({ email, hasPassword }: AccountDataProps) {
  const [deleting, setDeleting] = useState(false);
  return (
    <div className="space-y-3">
      <p className="text-soft">
        The export is one JSON file: your account, workshops and roles, the notebooks you own with
        their current content, and your keys without their secrets.
      </p>
      <div className="flex flex-wrap gap-2">
        <Download href="/api/account/export">Export my data</Download>
        <Button look="warn" onClick={() => setDeleting(true)}>
          Delete my account …
        </Button>
      </div>
      {deleting && (
        <DeleteDialog email={email} hasPassword={hasPassword} onClose={() => setDeleting(false)} />
      )}
    </div>
  );
}
