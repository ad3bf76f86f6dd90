import type { Metadata } from 'next';
import { SearchView } from '@/components/search/search-view';
import { personForPage } from '@/lib/accounts/session';
import { SearchRequest, search } from '@/lib/notebooks';

export const metadata: Metadata = { title: 'Search' };

interface PageProps {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export default async function SearchPage({ searchParams }: PageProps) {
  const { q, archived } = await searchParams;
  const asked = SearchRequest.safeParse({ q, archived });
  const request = asked.success ? asked.data : SearchRequest.parse({});
  const address = new URLSearchParams({ q: request.q }).toString();
  const person = await personForPage(`/search?${address}`);
  const first = await search(person, request);
  return (
    <div className="mx-auto max-w-page space-y-5">
      <h1 className="font-serif text-head font-semibold">Search</h1>
      {/* A new address begins anew; what is typed here changes the address without a new page. */}
      <SearchView
        key={address}
        query={request.q}
        archived={request.archived === '1'}
        first={first}
      />
    </div>
  );
}
