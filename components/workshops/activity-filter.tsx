import { Button, Download, LinkButton } from '@/components/ui/button';
import { Choice, Field } from '@/components/ui/field';

export interface ActivityAsked {
  person: string;
  group: string;
  from: string;
  to: string;
}

interface ActivityFilterProps {
  workshopId: string;
  asked: ActivityAsked;
  people: readonly { id: string; name: string }[];
  groups: readonly { name: string; title: string }[];
}

/** What is looked for; an ordinary form, so that its answer has an address. */
export function ActivityFilter({ workshopId, asked, people, groups }: ActivityFilterProps) {
  const set = Object.entries(asked).filter(([, value]) => value !== '');
  const query = new URLSearchParams(set).toString();
  return (
    <form className="grid items-end gap-3 border border-rule bg-sheet p-4 sm:grid-cols-2 lg:grid-cols-[minmax(0,1fr)_minmax(0,1fr)_10rem_10rem]">
      <Choice label="Person" name="person" defaultValue={asked.person}>
        <option value="">everybody</option>
        {people.map(({ id, name }) => (
          <option key={id} value={id}>
            {name}
          </option>
        ))}
      </Choice>
      <Choice label="Kind" name="group" defaultValue={asked.group}>
        <option value="">everything</option>
        {groups.map(({ name, title }) => (
          <option key={name} value={name}>
            {title}
          </option>
        ))}
      </Choice>
      <Field label="From" name="from" type="date" defaultValue={asked.from} />
      <Field label="To" name="to" type="date" defaultValue={asked.to} />
      <div className="flex flex-wrap items-center justify-between gap-2 sm:col-span-full">
        <Download href={`/api/workshops/${workshopId}/activity/csv?${query}`}>
          These lines as CSV
        </Download>
        <span className="flex gap-2">
          {set.length > 0 && (
            <LinkButton href={`/workshops/${workshopId}/activity`}>Everything</LinkButton>
          )}
          <Button type="submit" look="main">
            Show
          </Button>
        </span>
      </div>
    </form>
  );
}
