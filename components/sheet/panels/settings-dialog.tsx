'use client';

import { useState } from 'react';
import type { NotebookSettings } from '@/lib/notebooks/content';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Choice, Field } from '@/components/ui/field';
import { readStep } from '../read-step';
import { ROUNDINGS } from '../title-fields';

interface SettingsDialogProps {
  settings: NotebookSettings;
  onSet: (settings: NotebookSettings) => void;
  onClose: () => void;
}

export function SettingsDialog({ settings, onSet, onClose }: SettingsDialogProps) {
  const [unit, setUnit] = useState(settings.unit);
  const [step, setStep] = useState(settings.step ?? '');
  const [digits, setDigits] = useState(String(settings.digits));
  const [rounding, setRounding] = useState(settings.rounding);
  const [faults, setFaults] = useState<{ step?: string; digits?: string }>({});

  const submit = () => {
    const read = readStep(step, unit);
    const count = Number(digits);
    const digitsFault =
      Number.isInteger(count) && count >= 1 && count <= 1000
        ? undefined
        : 'Write a whole number from 1 to 1000.';
    if ('fault' in read || digitsFault !== undefined) {
      setFaults({
        ...('fault' in read ? { step: read.fault } : {}),
        ...(digitsFault === undefined ? {} : { digits: digitsFault }),
      });
      return;
    }
    onSet({ unit, step: read.step, digits: count, rounding });
    onClose();
  };

  return (
    <Dialog title="Unit, step and rounding" onClose={onClose}>
      <form
        className="space-y-4"
        noValidate
        onSubmit={(event) => {
          event.preventDefault();
          submit();
        }}
      >
        <div className="grid gap-4 sm:grid-cols-2">
          <Choice
            label="Unit of the sheet"
            value={unit}
            onChange={(event) => setUnit(event.target.value as NotebookSettings['unit'])}
          >
            {(['mm', 'cm', 'm', 'in', 'ft'] as const).map((one) => (
              <option key={one}>{one}</option>
            ))}
          </Choice>
          <Field
            label="Cutting step"
            hint="Every length is rounded to a multiple of it. Empty: none."
            value={step}
            placeholder="0.5 mm"
            fault={faults.step}
            onChange={(event) => setStep(event.target.value)}
          />
          <Choice
            label="Rounding"
            value={rounding}
            onChange={(event) => setRounding(event.target.value as NotebookSettings['rounding'])}
          >
            {Object.entries(ROUNDINGS).map(([value, words]) => (
              <option key={value} value={value}>
                {words}
              </option>
            ))}
          </Choice>
          <Field
            label="Significant digits of decimals"
            inputMode="numeric"
            value={digits}
            fault={faults.digits}
            onChange={(event) => setDigits(event.target.value)}
          />
        </div>
        <div className="flex justify-end">
          <Button type="submit" look="main">
            Set
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
