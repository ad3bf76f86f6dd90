import type { Metadata } from 'next';
import { DivideForm } from '@/components/divide/divide-form';
import { DivisionSheet } from '@/components/divide/division-sheet';
import { divide } from '@/lib/divisions';

export const metadata: Metadata = { title: 'Divide a circle' };

interface DividePageProps {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

const FIRST = { n: '17', radius: '1200 mm' };

export default async function DividePage({ searchParams }: DividePageProps) {
  const asked = await searchParams;
  const given = (name: keyof typeof FIRST) => {
    const value = asked[name];
    return value === undefined ? FIRST[name] : Array.isArray(value) ? value.join(', ') : value;
  };
  const [parts, radius] = [given('n'), given('radius')];
  const outcome = divide(parts, radius);
  const found = outcome.kind === 'value' ? outcome.value : null;
  return (
    <div className="mx-auto max-w-page space-y-6">
      <div>
        <h1 className="font-serif text-title font-semibold">Divide a circle</h1>
        <p className="mt-2 max-w-prose text-soft">
          Whether straightedge and compass reach equal parts, by which steps, and how large the
          polygon is. Every statement is decided exactly.
        </p>
      </div>
      <DivideForm parts={parts} radius={radius} fault={outcome.kind === 'value' ? null : outcome} />
      {found && <DivisionSheet division={found} radiusTyped={radius} />}
    </div>
  );
}
