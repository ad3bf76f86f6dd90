import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import type { DivisionOutcome } from '@/lib/divisions';

interface DivideFormProps {
  parts: string;
  radius: string;
  fault: Exclude<DivisionOutcome, { kind: 'value' }> | null;
}

/** Asks by address, so that an answer can be linked to, and works without script. */
export function DivideForm({ parts, radius, fault }: DivideFormProps) {
  const about = fault?.code.startsWith('radius') ? 'radius' : 'parts';
  return (
    <form
      action="/divide"
      className="grid max-w-xl items-start gap-4 sm:grid-cols-[1fr_1fr_auto] print:hidden"
    >
      <Field
        key={`n=${parts}`}
        label="Parts"
        name="n"
        inputMode="numeric"
        autoComplete="off"
        defaultValue={parts}
        hint="1 to 1 000 000"
        fault={fault && about === 'parts' ? fault.message : null}
      />
      <Field
        key={`radius=${radius}`}
        label="Radius"
        name="radius"
        autoComplete="off"
        defaultValue={radius}
        hint="such as 1200 mm or 47 1/4 in"
        fault={fault && about === 'radius' ? fault.message : null}
      />
      <Button type="submit" look="main" className="min-h-10 sm:mt-[1.375rem]">
        Divide
      </Button>
    </form>
  );
}
