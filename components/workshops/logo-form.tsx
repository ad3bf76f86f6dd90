'use client';

import { useId } from 'react';
import type { Logo } from '@/lib/accounts';
import { ask } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { useChange } from './use-change';

interface LogoFormProps {
  path: string;
  logo: Logo | null;
  mayChange: boolean;
}

/** The picture beside the legal owner; kept as soon as it is chosen. */
export function LogoForm({ path, logo, mayChange }: LogoFormProps) {
  const { fault, busy, run } = useChange();
  const id = useId();
  return (
    <section
      aria-labelledby={`${id}-title`}
      className="min-w-0 space-y-4 border border-rule bg-sheet p-4"
    >
      <div>
        <h2 id={`${id}-title`} className="text-figure font-semibold">
          Logo
        </h2>
        <p className="text-small text-soft">
          A PNG, JPEG or WebP picture of at most 256 kB and 2000 pixels a side. Issued revisions
          keep the logo they were issued with.
        </p>
      </div>
      <div className="flex min-h-24 items-center justify-center border border-hairline bg-[#fff] p-3">
        {logo ? (
          <img
            src={`${path}/logo/${logo.hash}`}
            width={logo.width}
            height={logo.height}
            alt="The logo as it stands in title blocks"
            className="max-h-24 w-auto object-contain"
          />
        ) : (
          <p className="text-small text-[#556063]">No logo yet.</p>
        )}
      </div>
      {fault && <Notice tone="fault">{fault}</Notice>}
      {mayChange && (
        <div className="flex flex-wrap items-end justify-between gap-3">
          <div className="min-w-0 space-y-1">
            <label htmlFor={id} className="block text-small font-medium">
              {logo ? 'Another picture' : 'Picture'}
            </label>
            <input
              id={id}
              type="file"
              accept="image/png,image/jpeg,image/webp"
              disabled={busy}
              className="w-full text-small file:mr-3 file:min-h-9 file:rounded-cut file:border file:border-rule file:bg-sheet file:px-3 file:text-ink"
              onChange={(event) => {
                const { files } = event.target;
                const file = files?.[0];
                if (file) void run(() => ask(`${path}/logo`, { method: 'PUT', file }));
                event.target.value = '';
              }}
            />
          </div>
          {logo && (
            <Button
              look="warn"
              disabled={busy}
              onClick={() => void run(() => ask(`${path}/logo`, { method: 'DELETE' }))}
            >
              Remove
            </Button>
          )}
        </div>
      )}
    </section>
  );
}
