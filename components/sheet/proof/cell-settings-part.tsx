'use client';

import { useState } from 'react';
import type { CellSettings, NotebookCell, NotebookSettings } from '@/lib/notebooks/content';
import { CONTENT_LIMITS } from '@/lib/notebooks/content-values';
import { Button } from '@/components/ui/button';
import { Choice, Field } from '@/components/ui/field';
import type { SheetActions } from '../cells';
import { readStep } from '../read-step';
import { ROUNDINGS } from '../title-fields';
import { Part } from './part';

interface CellSettingsPartProps {
  cell: NotebookCell;
  whole: NotebookSettings;
  actions: SheetActions;
}

const UNITS = ['mm', 'cm', 'm', 'in', 'ft'] as const;
/** The choice that follows the sheet; no setting is written so. */
const SHEET = '';

/** In what the cell is given, where that differs from the sheet. */
export function CellSettingsPart({ cell, whole, actions }: CellSettingsPartProps) {
  const own = cell.settings ?? {};
  const [faults, setFaults] = useState<{ step?: string; digits?: string }>({});
  const set = (change: Partial<Record<keyof CellSettings, CellSettings[keyof CellSettings]>>) => {
    const settings = { ...own, ...change } as CellSettings;
    actions.dispatch({ kind: 'set-cell', id: cell.id, settings });
  };

  const setDigits = (text: string) => {
    const count = Number(text);
    const right = Number.isInteger(count) && count >= 1 && count <= CONTENT_LIMITS.digits;
    if (text.trim() !== '' && !right) {
      setFaults({ ...faults, digits: `Write a whole number from 1 to ${CONTENT_LIMITS.digits}.` });
      return;
    }
    setFaults({ ...faults, digits: undefined });
    set({ digits: text.trim() === '' ? undefined : count });
  };
  const setStep = (text: string) => {
    if (text.trim().toLowerCase() === 'none') {
      setFaults({ ...faults, step: undefined });
      set({ step: null });
      return;
    }
    const read = readStep(text, own.unit ?? whole.unit);
    setFaults({ ...faults, step: 'fault' in read ? read.fault : undefined });
    if ('step' in read) set({ step: read.step ?? undefined });
  };

  return (
    <Part title="This cell alone">
      <div className="grid gap-3 sm:grid-cols-2" key={cell.id}>
        <Choice
          label="Unit"
          value={own.unit ?? SHEET}
          onChange={({ target: { value } }) => set({ unit: value === SHEET ? undefined : value })}
        >
          <option value={SHEET}>{`as the sheet: ${whole.unit}`}</option>
          {UNITS.map((unit) => (
            <option key={unit}>{unit}</option>
          ))}
        </Choice>
        <Choice
          label="Rounding"
          value={own.rounding ?? SHEET}
          onChange={({ target: { value } }) =>
            set({ rounding: value === SHEET ? undefined : value })
          }
        >
          <option value={SHEET}>{`as the sheet: ${ROUNDINGS[whole.rounding]}`}</option>
          {Object.entries(ROUNDINGS).map(([value, words]) => (
            <option key={value} value={value}>
              {words}
            </option>
          ))}
        </Choice>
        <Field
          key={`step ${own.step}`}
          label="Cutting step"
          hint="“none” for no cut size here; empty follows the sheet."
          defaultValue={own.step === undefined ? '' : (own.step ?? 'none')}
          placeholder={whole.step ?? 'none'}
          fault={faults.step ?? null}
          onBlur={(event) => setStep(event.target.value)}
        />
        <Field
          key={`digits ${own.digits}`}
          label="Digits"
          inputMode="numeric"
          hint="Empty follows the sheet."
          defaultValue={own.digits ?? ''}
          placeholder={String(whole.digits)}
          fault={faults.digits ?? null}
          onBlur={(event) => setDigits(event.target.value)}
        />
      </div>
      {cell.settings !== undefined && (
        <Button
          look="quiet"
          onClick={() => actions.dispatch({ kind: 'set-cell', id: cell.id, settings: {} })}
        >
          Follow the sheet again
        </Button>
      )}
    </Part>
  );
}
