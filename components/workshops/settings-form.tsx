'use client';

import { useState, type ReactNode } from 'react';
import type { WorkshopSettings } from '@/lib/accounts';
import { Refusal, ask } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Choice, Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { fieldFaults } from '@/components/accounts/use-asking';
import { readStep } from '@/components/sheet/read-step';
import { ROUNDINGS } from '@/components/sheet/title-fields';
import { TOLERANCE_WORDS, type ToleranceClass } from '@/components/sheet/tolerance-words';
import { useChange } from './use-change';

const UNITS = ['mm', 'cm', 'm', 'in', 'ft'] as const;

interface GroupProps {
  title: string;
  about: string;
  path: string;
  /** What is sent; null while something cannot be read. */
  read: () => object | null;
  /** Faults of single fields, by their path in the request. */
  onFaults?: (faults: Partial<Record<string, string>>) => void;
  mayChange: boolean;
  children: ReactNode;
}

/** One group of settings, kept as a whole. */
export function Group({ title, about, path, read, onFaults, mayChange, children }: GroupProps) {
  const { fault, busy, runOr } = useChange();
  const [kept, setKept] = useState(false);
  return (
    <form
      aria-label={title}
      noValidate
      className="min-w-0 space-y-4 border border-rule bg-sheet p-4"
      onChange={() => setKept(false)}
      onSubmit={(event) => {
        event.preventDefault();
        setKept(false);
        onFaults?.({});
        const body = read();
        if (body === null) return;
        void runOr(
          () => ask(path, { method: 'PATCH', body }),
          (refusal: Refusal) => {
            const faults = fieldFaults(refusal);
            onFaults?.(faults);
            return onFaults !== undefined && Object.keys(faults).length > 0;
          },
        ).then(setKept);
      }}
    >
      <div>
        <h2 className="text-figure font-semibold">{title}</h2>
        <p className="text-small text-soft">{about}</p>
      </div>
      <fieldset disabled={!mayChange} className="space-y-4">
        {children}
      </fieldset>
      {fault && <Notice tone="fault">{fault}</Notice>}
      {kept && <Notice tone="good">Kept.</Notice>}
      {mayChange && (
        <div className="flex justify-end">
          <Button type="submit" look="main" disabled={busy}>
            Set
          </Button>
        </div>
      )}
    </form>
  );
}

interface FormProps<Part extends keyof WorkshopSettings> {
  path: string;
  settings: WorkshopSettings[Part];
  mayChange: boolean;
}

/** What new notebooks begin with. */
export function StartForm({ path, settings, mayChange }: FormProps<'start'>) {
  const [start, setStart] = useState(settings);
  const [step, setStep] = useState(settings.step ?? '');
  const [digits, setDigits] = useState(String(settings.digits));
  const [faults, setFaults] = useState<Partial<Record<string, string>>>({});
  const read = () => {
    const size = readStep(step, start.unit);
    const count = Number(digits);
    const isCount = Number.isInteger(count) && count >= 1 && count <= 1000;
    setFaults({
      ...('fault' in size ? { 'start.step': size.fault } : {}),
      ...(isCount ? {} : { 'start.digits': 'Write a whole number from 1 to 1000.' }),
    });
    if ('fault' in size || !isCount) return null;
    return { start: { ...start, step: size.step, digits: count } };
  };
  return (
    <Group
      title="Start values"
      about="New notebooks begin with these. Those that exist keep theirs."
      path={path}
      read={read}
      onFaults={setFaults}
      mayChange={mayChange}
    >
      <div className="grid gap-4 sm:grid-cols-2">
        <Choice
          label="Unit"
          value={start.unit}
          onChange={(event) =>
            setStart({ ...start, unit: event.target.value as typeof start.unit })
          }
        >
          {UNITS.map((unit) => (
            <option key={unit}>{unit}</option>
          ))}
        </Choice>
        <Field
          label="Cutting step"
          hint="Empty: none."
          placeholder="0.5 mm"
          value={step}
          fault={faults['start.step'] ?? null}
          onChange={(event) => setStep(event.target.value)}
        />
        <Choice
          label="Rounding"
          value={start.rounding}
          onChange={(event) =>
            setStart({ ...start, rounding: event.target.value as typeof start.rounding })
          }
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
          fault={faults['start.digits'] ?? null}
          onChange={(event) => setDigits(event.target.value)}
        />
        <div className="sm:col-span-2">
          <Choice
            label="General tolerances after ISO 2768-1"
            hint="Stands in the title block of every notebook that names no other class."
            value={start.toleranceClass ?? ''}
            onChange={(event) =>
              setStart({
                ...start,
                toleranceClass: (event.target.value || null) as ToleranceClass | null,
              })
            }
          >
            <option value="">none named</option>
            {Object.entries(TOLERANCE_WORDS).map(([value, words]) => (
              <option key={value} value={value}>
                {words}
              </option>
            ))}
          </Choice>
        </div>
      </div>
    </Group>
  );
}

/** Who issues revisions, and what must have happened before. */
export function IssuingForm({ path, settings, mayChange }: FormProps<'issuing'>) {
  const [issuing, setIssuing] = useState(settings);
  const rules = [
    {
      name: 'editorsIssue',
      label: 'Editors issue revisions too',
      hint: 'Otherwise owners alone do.',
    },
    {
      name: 'checkNeeded',
      label: 'A version is checked before it is issued',
      hint: 'By somebody other than its author.',
    },
  ] as const;
  return (
    <Group
      title="Issuing revisions"
      about="Holds for all notebooks of the workshop from now on."
      path={path}
      read={() => ({ issuing })}
      mayChange={mayChange}
    >
      {rules.map(({ name, label, hint }) => (
        <label key={name} className="flex items-start gap-3">
          <input
            type="checkbox"
            checked={issuing[name]}
            className="mt-1 size-5 shrink-0 accent-ruddle"
            onChange={(event) => setIssuing({ ...issuing, [name]: event.target.checked })}
          />
          <span>
            <span className="block font-medium">{label}</span>
            <span className="block text-small text-soft">{hint}</span>
          </span>
        </label>
      ))}
    </Group>
  );
}

/** What the workshop is called. */
export function NameForm({
  path,
  name: first,
  mayChange,
}: {
  path: string;
  name: string;
  mayChange: boolean;
}) {
  const [name, setName] = useState(first);
  const [faults, setFaults] = useState<Partial<Record<string, string>>>({});
  return (
    <Group
      title="Name"
      about="Stands above its notebooks, and as legal owner where none is named."
      path={path}
      read={() => ({ name })}
      onFaults={setFaults}
      mayChange={mayChange}
    >
      <Field
        label="Name of the workshop"
        maxLength={120}
        value={name}
        fault={faults.name ?? null}
        onChange={(event) => setName(event.target.value)}
      />
    </Group>
  );
}
