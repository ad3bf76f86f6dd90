import type { Metadata } from 'next';
import { TitleBlock } from '@/components/drawing/title-block';
import { titleFields } from '@/components/sheet/title-fields';
import { orNotFound } from '@/components/site/or-not-found';
import { LogoForm } from '@/components/workshops/logo-form';
import { TitleBlockForm } from '@/components/workshops/title-block-form';
import { WorkshopFrame } from '@/components/workshops/workshop-frame';
import { ALLOWED_IN_WORKSHOP } from '@/lib/access';
import { personForPage } from '@/lib/accounts/session';
import { TitleBlockEntries, titleBlockOf } from '@/lib/notebooks';
import { readWorkshop } from '@/lib/workshops';

export const metadata: Metadata = { title: 'Title block and logo' };

interface PageProps {
  params: Promise<{ id: string }>;
}

/** A sheet that nobody has begun, to show what the workshop says in its title block. */
const SAMPLE = { id: '0107', title: 'Title of a notebook' };

export default async function WorkshopTitleBlockPage({ params }: PageProps) {
  const { id } = await params;
  const person = await personForPage(`/workshops/${id}/title-block`);
  const workshop = await orNotFound(readWorkshop(person, id));
  const { start, titleBlock } = workshop.settings;
  const form = {
    path: `/api/workshops/${id}`,
    mayChange: ALLOWED_IN_WORKSHOP[workshop.role].has('workshop.change'),
  };
  const block = titleBlockOf({
    notebook: SAMPLE,
    workshop,
    entries: TitleBlockEntries.parse({}),
    author: person.name,
  });
  return (
    <WorkshopFrame workshop={workshop} part="title-block">
      {!form.mayChange && <p className="text-small text-soft">Only an admin changes these.</p>}
      <div className="grid items-start gap-6 lg:grid-cols-2">
        <TitleBlockForm {...form} workshop={workshop.name} settings={titleBlock} />
        <LogoForm {...form} logo={titleBlock.logo} />
      </div>
      <section aria-labelledby="sample" className="space-y-2">
        <h2 id="sample" className="text-small font-semibold">
          As it stands at the foot of a new sheet
        </h2>
        <div className="border-b-2 border-r-2 border-ink max-sm:border-l-2 lg:max-w-3xl">
          <TitleBlock
            fields={titleFields({
              block,
              version: 0,
              savedAt: null,
              settings: start,
              logoAt: `${form.path}/logo`,
            })}
          />
        </div>
      </section>
    </WorkshopFrame>
  );
}
