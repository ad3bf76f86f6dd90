import Link from 'next/link';
import type { ReactNode } from 'react';
import { ALLOWED_IN_WORKSHOP, type WorkshopAction, type WorkshopRole } from '@/lib/access';

const PARTS = {
  members: { path: '', title: 'Members', needs: 'members.list' },
  settings: { path: '/settings', title: 'Start values and issuing', needs: 'workshop.read' },
  'title-block': { path: '/title-block', title: 'Title block and logo', needs: 'workshop.read' },
  activity: { path: '/activity', title: 'Activity', needs: 'activity.read' },
} as const satisfies Record<string, { path: string; title: string; needs: WorkshopAction }>;

export type WorkshopPart = keyof typeof PARTS;

interface WorkshopFrameProps {
  workshop: { id: string; name: string; role: WorkshopRole };
  part: WorkshopPart;
  children: ReactNode;
}

/** Head and index of a workshop's pages. */
export function WorkshopFrame({ workshop, part, children }: WorkshopFrameProps) {
  const parts = Object.entries(PARTS).filter(([, { needs }]) =>
    ALLOWED_IN_WORKSHOP[workshop.role].has(needs),
  );
  return (
    <div className="mx-auto max-w-page space-y-5">
      <div>
        <p className="text-small">
          <Link href="/workshops" className="text-snapline underline-offset-4 hover:underline">
            Workshops
          </Link>
        </p>
        <h1 className="font-serif text-head font-semibold [overflow-wrap:anywhere]">
          {workshop.name}
        </h1>
        <p className="text-small text-soft">
          You are {workshop.role === 'admin' ? 'an admin' : 'a member'} of this workshop.
        </p>
      </div>
      <nav aria-label="Parts of the workshop" className="border-b border-rule">
        <ul className="-mb-px flex flex-wrap gap-x-6">
          {parts.map(([name, { path, title }]) => (
            <li key={name}>
              <Link
                href={`/workshops/${workshop.id}${path}`}
                aria-current={name === part ? 'page' : undefined}
                className="inline-block border-b-2 border-transparent py-2 text-small text-snapline underline-offset-4 hover:underline aria-[current]:border-ink aria-[current]:font-semibold aria-[current]:text-ink"
              >
                {title}
              </Link>
            </li>
          ))}
        </ul>
      </nav>
      {children}
    </div>
  );
}
