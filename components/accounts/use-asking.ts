'use client';

import { useState } from 'react';
import { Refusal, sayFault } from '@/components/ui/ask';

export type Faults = Partial<Record<string, string>>;

/** The faults of single fields, as the problem document lists them. */
export function fieldFaults(refusal: Refusal): Faults {
  const { fields } = refusal.document;
  if (!Array.isArray(fields)) return {};
  return Object.fromEntries(
    fields.map((fault: { field: string; message: string }) => [fault.field, fault.message]),
  );
}

/**
 * What a form goes through while it asks the server: busy, then done or refused, with the sentence
 * under the field it is about where the form has that field.
 */
export function useAsking(fields: readonly string[]) {
  const [busy, setBusy] = useState(false);
  const [fault, setFault] = useState<string | null>(null);
  const [faults, setFaults] = useState<Faults>({});

  /** Whether it worked. */
  const run = async (work: () => Promise<unknown>): Promise<boolean> => {
    setBusy(true);
    setFault(null);
    setFaults({});
    try {
      await work();
      return true;
    } catch (refused) {
      const placed = refused instanceof Refusal ? fieldFaults(refused) : {};
      setFaults(placed);
      if (!fields.some((field) => placed[field] !== undefined)) setFault(sayFault(refused));
      return false;
    } finally {
      setBusy(false);
    }
  };

  return { busy, fault, faults, run };
}
