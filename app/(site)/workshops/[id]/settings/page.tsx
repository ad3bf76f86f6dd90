import type { Metadata } from 'next';
import { orNotFound } from '@/components/site/or-not-found';
import { IssuingForm, NameForm, StartForm } from '@/components/workshops/settings-form';
import { WorkshopFrame } from '@/components/workshops/workshop-frame';
import { ALLOWED_IN_WORKSHOP } from '@/lib/access';
import { personForPage } from '@/lib/accounts/session';
import { readWorkshop } from '@/lib/workshops';

export const metadata: Metadata = { title: 'Start values and issuing' };

interface PageProps {
  params: Promise<{ id: string }>;
}

export default async function WorkshopSettingsPage({ params }: PageProps) {
  const { id } = await params;
  const person = await personForPage(`/workshops/${id}/settings`);
  const workshop = await orNotFound(readWorkshop(person, id));
  const { start, issuing } = workshop.settings;
  const form = {
    path: `/api/workshops/${id}`,
    mayChange: ALLOWED_IN_WORKSHOP[workshop.role].has('workshop.change'),
  };
  return (
    <WorkshopFrame workshop={workshop} part="settings">
      {!form.mayChange && <p className="text-small text-soft">Only an admin changes these.</p>}
      <div className="grid items-start gap-6 lg:grid-cols-2">
        <StartForm {...form} settings={start} />
        <div className="space-y-6">
          <IssuingForm {...form} settings={issuing} />
          <NameForm {...form} name={workshop.name} />
        </div>
      </div>
    </WorkshopFrame>
  );
}
