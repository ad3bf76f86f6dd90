import type { Metadata } from 'next';
import Link from 'next/link';
import { NewWorkshop } from '@/components/workshops/new-workshop';
import { workshopsOf } from '@/lib/accounts';
import { personForPage } from '@/lib/accounts/session';

export const metadata: Metadata = { title: 'Workshops' };

export default async function WorkshopsPage() {
  const workshops = await workshopsOf(await personForPage('/workshops'));
  return (
    <div className="mx-auto max-w-page space-y-5">
      <div className="flex flex-wrap items-end justify-between gap-3">
        <h1 className="font-serif text-head font-semibold">Workshops</h1>
        <NewWorkshop />
      </div>
      {workshops.length === 0 ? (
        <p className="border border-rule bg-sheet px-4 py-10 text-center text-soft">
          You belong to no workshop. Notebooks that were shared with you are under Notebooks; to
          begin your own, make a workshop or ask for an invitation to one.
        </p>
      ) : (
        <ul className="border border-rule bg-sheet">
          {workshops.map(({ id, name, admin }) => (
            <li
              key={id}
              className="flex flex-wrap items-baseline justify-between gap-x-6 border-b border-hairline px-3 py-2.5 last:border-b-0 hover:bg-hand"
            >
              <Link
                href={`/workshops/${id}`}
                className="min-w-0 font-serif text-note font-semibold text-snapline underline-offset-4 hover:underline [overflow-wrap:anywhere]"
              >
                {name}
              </Link>
              <span className="text-small text-soft">
                {admin ? 'you are an admin' : 'you are a member'}
              </span>
            </li>
          ))}
        </ul>
      )}
    </div>
  );
}
