import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { orNotFound } from '@/components/site/or-not-found';
import { LinkButton } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { ActivityFilter } from '@/components/workshops/activity-filter';
import { ActivityList } from '@/components/workshops/activity-list';
import { WorkshopFrame } from '@/components/workshops/workshop-frame';
import { ALLOWED_IN_WORKSHOP } from '@/lib/access';
import { DEED_GROUPS, titleOfGroup } from '@/lib/activity';
import { personForPage } from '@/lib/accounts/session';
import { ActivityQuery, readActivity, readWorkshop } from '@/lib/workshops';

export const metadata: Metadata = { title: 'Activity' };

interface PageProps {
  params: Promise<{ id: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

const groups = DEED_GROUPS.map((name) => ({ name, title: titleOfGroup(name) }));

export default async function ActivityPage({ params, searchParams }: PageProps) {
  const { id } = await params;
  const person = await personForPage(`/workshops/${id}/activity`);
  const workshop = await orNotFound(readWorkshop(person, id));
  if (!ALLOWED_IN_WORKSHOP[workshop.role].has('activity.read')) notFound();
  const sent = await searchParams;
  const given = (name: string) => (typeof sent[name] === 'string' ? sent[name] : '');
  const asked = {
    person: given('person'),
    group: given('group'),
    from: given('from'),
    to: given('to'),
  };
  const query = ActivityQuery.safeParse({ ...asked, before: given('before') });
  const page = await orNotFound(readActivity(person, id, query.data ?? {}));
  const older = new URLSearchParams(Object.entries(asked).filter(([, value]) => value !== ''));
  const newest = older.toString();
  if (page.before !== null) older.set('before', String(page.before));
  const path = `/workshops/${id}/activity`;
  return (
    <WorkshopFrame workshop={workshop} part="activity">
      <ActivityFilter workshopId={id} asked={asked} people={page.people} groups={groups} />
      {!query.success && (
        <Notice tone="fault">
          {query.error.issues[0]?.message ?? 'This cannot be looked for.'} Everything is shown.
        </Notice>
      )}
      <ActivityList entries={page.entries} />
      <div className="flex justify-between gap-3">
        {given('before') ? <LinkButton href={`${path}?${newest}`}>Newest</LinkButton> : <span />}
        {page.before !== null && (
          <LinkButton href={`${path}?${older.toString()}`}>Older</LinkButton>
        )}
      </div>
    </WorkshopFrame>
  );
}
