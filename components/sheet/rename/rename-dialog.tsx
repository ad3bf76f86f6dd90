'use client';

import { useMemo, useState } from 'react';
import type { NotebookCell, NotebookContent } from '@/lib/notebooks/content';
import { findPlaces, renameMark } from '@/lib/language/rename';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Field } from '@/components/ui/field';
import { Sentence } from '@/components/ui/sentence';

interface RenameDialogProps {
  mark: string;
  content: NotebookContent;
  onRename: (content: NotebookContent, name: string, places: number) => void;
  onClose: () => void;
}

const isDimension = ({ kind }: NotebookCell) => kind === 'dimension';

const count = (number: number, one: string) => `${number} ${one}${number === 1 ? '' : 's'}`;

/** Asks for another name for a mark, says where it stands and why a name cannot be taken. */
export function RenameDialog({ mark, content, onRename, onClose }: RenameDialogProps) {
  const [name, setName] = useState(mark);
  const [asked, setAsked] = useState(false);
  const cells = useMemo(() => content.cells.filter(isDimension), [content]);
  const places = useMemo(() => findPlaces(cells, mark), [cells, mark]);
  const renaming = useMemo(() => renameMark(cells, mark, name.trim()), [cells, mark, name]);
  const refusal = renaming.kind === 'refused' ? renaming : null;
  const shown = refusal && (asked || !['same', 'not-a-name'].includes(refusal.reason));
  const inCells = new Set(places.map(({ cell }) => cell)).size;

  const submit = () => {
    setAsked(true);
    if (renaming.kind !== 'renamed') return;
    const changed = new Map(renaming.cells.map((cell) => [cell.id, cell]));
    const renamed = content.cells.map((cell) => changed.get(cell.id) ?? cell);
    onRename({ ...content, cells: renamed }, name.trim(), renaming.places);
  };

  return (
    <Dialog title={`Rename the mark ${mark}`} onClose={onClose}>
      <form
        className="space-y-4"
        onSubmit={(event) => {
          event.preventDefault();
          submit();
        }}
      >
        <Field
          label="New name"
          value={name}
          onChange={(event) => setName(event.target.value)}
          onFocus={(event) => event.target.select()}
          hint={`${mark} stands in ${count(places.length, 'place')} in ${count(inCells, 'cell')}. Remarks and notes stay as they are.`}
          autoComplete="off"
          autoCapitalize="off"
          spellCheck={false}
          className="font-mono"
        />
        <div role="status" className="min-h-6 text-small">
          {shown && (
            <p className="text-ruddle">
              <Sentence text={refusal.message} />
              {refusal.suggestion !== null && (
                <Button
                  look="quiet"
                  className="ml-2"
                  onClick={() => setName(refusal.suggestion ?? name)}
                >
                  {`Take ${refusal.suggestion}`}
                </Button>
              )}
            </p>
          )}
        </div>
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Leave it</Button>
          <Button look="main" type="submit">
            Rename
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
