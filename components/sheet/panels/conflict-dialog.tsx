'use client';

import { useState, type ReactNode } from 'react';
import useSWR from 'swr';
import type { NotebookCell, NotebookContent } from '@/lib/notebooks/content';
import { keyOfConflict, settle, type Conflict, type Side } from '@/lib/notebooks/merge';
import { ask } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';
import { MarkedSource } from '@/components/versions/marked-source';
import { shortFigure } from '@/components/versions/short-figure';
import { evaluationRequest } from '../state/evaluation-request';
import type { Questions } from '../state/questions';
import type { CellAnswer } from '../state/shown';
import type { SaveState } from '../state/use-saving';

interface ConflictDialogProps {
  /** The sheet as it is now, with my readings in it. */
  content: NotebookContent;
  questions: Questions;
  state: SaveState;
  onAnswer: (sides: ReadonlyMap<string, Side>) => void;
  onTakeTheirs: () => void;
  onClose: () => void;
}

/**
 * Two people changed the same. Both texts stand side by side with what each comes to, question by question; nothing
 * is decided, and nothing lost, until a choice is made.
 */
export default function ConflictDialog(props: ConflictDialogProps) {
  const { content, questions, state, onAnswer, onTakeTheirs, onClose } = props;
  const { author, number, savedAt, conflicts } = questions;
  const [made, setMade] = useState<ReadonlyMap<string, Side>>(new Map());
  const chooseAll = (side: Side) =>
    setMade(new Map(conflicts.map((conflict) => [keyOfConflict(conflict), side])));
  const mine = useFigures(content);
  const theirs = useFigures(
    conflicts.reduce((held, conflict) => settle(held, conflict, 'theirs'), content),
  );

  return (
    <Dialog title={`${author} changed the same in version ${number}`} onClose={onClose} wide>
      <p>
        Version {number} was saved on <Moment at={savedAt} />, after you began. Everything else was
        brought together. Choose for each of these; until you do, your text stays on this sheet and
        in this browser, and version {number} stays in the list of versions.
      </p>
      <ul className="space-y-3">
        {conflicts.map((conflict) => {
          const key = keyOfConflict(conflict);
          return (
            <Question
              key={key}
              conflict={conflict}
              content={content}
              author={author}
              figures={{ mine, theirs }}
              choice={made.get(key) ?? 'mine'}
              onChoose={(side) => setMade(new Map(made).set(key, side))}
            />
          );
        })}
      </ul>
      {state.kind === 'failed' && <Notice tone="fault">{state.fault}</Notice>}
      <div className="flex flex-wrap justify-between gap-2 border-t border-hairline pt-3">
        <div className="flex flex-wrap gap-2">
          <Button look="quiet" onClick={() => chooseAll('mine')}>
            Choose all of mine
          </Button>
          <Button look="quiet" onClick={() => chooseAll('theirs')}>
            Choose all of theirs
          </Button>
        </div>
        <div className="flex flex-wrap gap-2">
          <Button onClick={onTakeTheirs}>Take theirs, put my text aside</Button>
          <Button
            look="main"
            disabled={state.kind === 'keeping'}
            onClick={() =>
              onAnswer(
                new Map(
                  conflicts.map((conflict) => {
                    const key = keyOfConflict(conflict);
                    return [key, made.get(key) ?? 'mine'] as const;
                  }),
                ),
              )
            }
          >
            Save what is chosen
          </Button>
        </div>
      </div>
    </Dialog>
  );
}

/** What a text comes to, asked once. */
function useFigures(content: NotebookContent): readonly CellAnswer[] | null {
  const request = evaluationRequest(content);
  const { data } = useSWR<{ cells: CellAnswer[] }>(
    request.cells.length === 0 ? null : ['/api/evaluate', 'both', JSON.stringify(request)],
    () => ask<{ cells: CellAnswer[] }>('/api/evaluate', { body: request }),
    { revalidateOnFocus: false, revalidateIfStale: false },
  );
  return data?.cells ?? null;
}

interface QuestionProps {
  conflict: Conflict;
  content: NotebookContent;
  author: string;
  figures: Record<Side, readonly CellAnswer[] | null>;
  choice: Side;
  onChoose: (side: Side) => void;
}

const KINDS: Record<NotebookCell['kind'], string> = {
  dimension: 'Dimension cell',
  note: 'Note',
  section: 'Section',
};

function Question(props: QuestionProps) {
  const { conflict, content, author, figures, choice, onChoose } = props;
  const sides = [
    { side: 'mine', name: 'Mine' },
    { side: 'theirs', name: author },
  ] as const;
  return (
    <li>
      <fieldset>
        <legend className="text-small text-soft">{headOf(conflict, content)}</legend>
        <div className="grid sm:grid-cols-2">
          {sides.map(({ side, name }) => (
            <label
              key={side}
              className={`flex min-w-0 cursor-pointer gap-2 border p-2.5 ${choice === side ? 'border-snapline bg-snapline-wash' : 'border-hairline'}`}
            >
              <input
                type="radio"
                name={`side-${keyOfConflict(conflict)}`}
                checked={choice === side}
                onChange={() => onChoose(side)}
                className="mt-1 shrink-0 accent-snapline"
              />
              <span className="min-w-0 grow">
                <span className="text-small font-semibold">{name}</span>
                <Reading
                  conflict={conflict}
                  content={content}
                  side={side}
                  figures={figures[side]}
                />
              </span>
            </label>
          ))}
        </div>
      </fieldset>
    </li>
  );
}

function headOf(conflict: Conflict, content: NotebookContent): string {
  if (conflict.kind === 'setting') return `Setting of the notebook: ${conflict.name}`;
  const cell = cellOf(content, conflict.id);
  const place = content.cells.findIndex(({ id }) => id === conflict.id) + 1;
  const kind = KINDS[cell?.kind ?? 'dimension'];
  const named = place > 0 ? `${kind} ${place}` : kind;
  if (conflict.kind === 'place') return `${named}, moved to two places`;
  if (conflict.mine === null) return `${named}, taken out by you and changed by them`;
  if (conflict.theirs === null) return `${named}, changed by you and taken out by them`;
  return `${named}, changed by both`;
}

const cellOf = (content: NotebookContent, id: string) =>
  content.cells.find((cell) => cell.id === id) ?? null;

interface ReadingProps {
  conflict: Conflict;
  content: NotebookContent;
  side: Side;
  figures: readonly CellAnswer[] | null;
}

const Plain = ({ children }: { children: ReactNode }) => (
  <span className="block text-small">{children}</span>
);

function Reading({ conflict, content, side, figures }: ReadingProps) {
  if (conflict.kind === 'setting') return <Plain>{conflict[side] ?? 'none'}</Plain>;
  if (conflict.kind === 'place') {
    const before = conflict[side] === null ? null : cellOf(content, conflict[side]);
    const line = before?.source.split('\n')[0] ?? '';
    return before === null ? (
      <Plain>at the top of the sheet</Plain>
    ) : (
      <Plain>
        after <code className="font-mono">{line || 'an empty cell'}</code>
      </Plain>
    );
  }
  // Mine as it stands now: it may have been written on since.
  const standing = conflict.mine === null ? null : cellOf(content, conflict.id);
  const cells = { mine: standing, theirs: conflict.theirs };
  const cell = cells[side];
  if (cell === null) return <Plain>taken out</Plain>;
  const other = cells[side === 'mine' ? 'theirs' : 'mine'];
  const results = figures?.find(({ id }) => id === cell.id)?.results ?? [];
  return (
    <>
      <MarkedSource source={cell.source} other={other?.source ?? ''} sign="differs" />
      {cell.kind === 'dimension' && (
        <span className="mt-1 block border-t border-hairline pt-1 text-small">
          {figures === null && cell.source.trim() !== '' ? 'working out…' : null}
          {results.map((result) => (
            <span key={result.line} className="block [overflow-wrap:anywhere]">
              {result.mark !== null && <b className="font-semibold">{result.mark} </b>}
              {shortFigure(result)}
            </span>
          ))}
        </span>
      )}
      {Object.entries(cell.settings ?? {}).map(([name, value]) => (
        <span key={name} className="block text-small text-soft">
          {`${name} ${value ?? 'none'}`}
        </span>
      ))}
    </>
  );
}
