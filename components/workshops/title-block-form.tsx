'use client';

import { useState } from 'react';
import type { WorkshopSettings } from '@/lib/accounts';
import { Field } from '@/components/ui/field';
import { Group } from './settings-form';

interface TitleBlockFormProps {
  path: string;
  workshop: string;
  settings: WorkshopSettings['titleBlock'];
  mayChange: boolean;
}

/** What stands the same in the title blocks of all notebooks of the workshop. */
export function TitleBlockForm({ path, workshop, settings, mayChange }: TitleBlockFormProps) {
  const [block, setBlock] = useState(settings);
  const [faults, setFaults] = useState<Partial<Record<string, string>>>({});
  const { legalOwner, identificationPrefix, approvalPerson } = block;
  return (
    <Group
      title="Title block"
      about="Fields after ISO 7200 that are the same on every sheet. A notebook says the rest itself."
      path={path}
      read={() => ({ titleBlock: { legalOwner, identificationPrefix, approvalPerson } })}
      onFaults={setFaults}
      mayChange={mayChange}
    >
      <Field
        label="Legal owner"
        placeholder={workshop}
        hint="Empty: the name of the workshop."
        maxLength={120}
        value={legalOwner}
        fault={faults['titleBlock.legalOwner'] ?? null}
        onChange={(event) => setBlock({ ...block, legalOwner: event.target.value })}
      />
      <div className="grid gap-4 sm:grid-cols-2">
        <Field
          label="Before identification numbers"
          placeholder="FY-"
          maxLength={20}
          value={identificationPrefix}
          fault={faults['titleBlock.identificationPrefix'] ?? null}
          onChange={(event) => setBlock({ ...block, identificationPrefix: event.target.value })}
        />
        <Field
          label="Approved by"
          maxLength={120}
          value={approvalPerson}
          fault={faults['titleBlock.approvalPerson'] ?? null}
          onChange={(event) => setBlock({ ...block, approvalPerson: event.target.value })}
        />
      </div>
    </Group>
  );
}
