'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { MemberWorkshop } from '@/lib/accounts/types';
import type { NamedWorkshop } from '@/lib/notebooks/types';
import { ask } from '@/components/ui/ask';
import { Choice, Field } from '@/components/ui/field';
import { DeedForm } from './deed-form';

/** UTF-16 units that a title may have. */
const TITLE_LENGTH = 200;

/** What the dialogs say and send of a notebook. */
export interface DeedNotebook {
  id: string;
  title: string;
  workshop: NamedWorkshop;
  archivedAt: string | null;
  template: boolean;
}

export interface DeedProps {
  notebook: DeedNotebook;
  workshops: readonly MemberWorkshop[];
  onClose: () => void;
}

const pathOf = ({ id }: DeedNotebook) => `/api/notebooks/${id}`;

/** Closes the dialog and shows the page as it is now. */
function useDone(onClose: () => void) {
  const router = useRouter();
  return () => {
    onClose();
    router.refresh();
  };
}

export function RenameDialog({ notebook, onClose }: DeedProps) {
  const [title, setTitle] = useState(notebook.title);
  const done = useDone(onClose);
  return (
    <DeedForm
      title="Rename the notebook"
      does="Rename"
      ready={title.trim() !== ''}
      onClose={onClose}
      onDo={() => ask(pathOf(notebook), { method: 'PATCH', body: { title } }).then(done)}
    >
      <TitleField title={title} onChange={setTitle} />
    </DeedForm>
  );
}

export function ArchiveDialog({ notebook, onClose }: DeedProps) {
  const archived = notebook.archivedAt !== null;
  const done = useDone(onClose);
  return (
    <DeedForm
      title={archived ? 'Bring it back' : 'Archive the notebook'}
      does={archived ? 'Bring back' : 'Archive'}
      onClose={onClose}
      onDo={() =>
        ask(pathOf(notebook), { method: 'PATCH', body: { archived: !archived } }).then(done)
      }
    >
      <p className="[overflow-wrap:anywhere]">
        {archived
          ? `“${notebook.title}” returns to the notebooks in use and can be changed again.`
          : `“${notebook.title}” can still be read, by client links too, but not changed, commented on or issued, until it is brought back.`}
      </p>
    </DeedForm>
  );
}

interface DuplicateProps extends DeedProps {
  /** The newest when left out. */
  version?: number;
}

export function DuplicateDialog({ notebook, version, workshops, onClose }: DuplicateProps) {
  const router = useRouter();
  const [title, setTitle] = useState(`Copy of ${notebook.title}`.slice(0, TITLE_LENGTH));
  const [workshopId, setWorkshopId] = useState(
    workshops.find(({ id }) => id === notebook.workshop.id)?.id ?? workshops[0]?.id ?? '',
  );
  return (
    <DeedForm
      title="Duplicate the notebook"
      does="Duplicate"
      ready={title.trim() !== '' && workshopId !== ''}
      onClose={onClose}
      onDo={async () => {
        const body = { title, workshopId, ...(version === undefined ? {} : { version }) };
        const { id } = await ask<{ id: string }>(`${pathOf(notebook)}/duplicate`, { body });
        router.push(`/notebooks/${id}`);
      }}
    >
      <p className="[overflow-wrap:anywhere]">
        {version === undefined ? 'The newest version' : `Version ${version}`} of “{notebook.title}”
        becomes a notebook of your own. Its comments, people, client links, revisions and earlier
        versions stay behind.
      </p>
      <TitleField title={title} onChange={setTitle} />
      {workshops.length > 1 && (
        <WorkshopChoice workshops={workshops} chosen={workshopId} onChange={setWorkshopId} />
      )}
      {workshops.length === 0 && <p>You belong to no workshop, and a notebook needs one.</p>}
    </DeedForm>
  );
}

export function MoveDialog({ notebook, workshops, onClose }: DeedProps) {
  const others = workshops.filter(({ id }) => id !== notebook.workshop.id);
  const [workshopId, setWorkshopId] = useState(others[0]?.id ?? '');
  const target = others.find(({ id }) => id === workshopId);
  const done = useDone(onClose);
  return (
    <DeedForm
      title="Move to another workshop"
      does="Move"
      ready={target !== undefined}
      onClose={onClose}
      onDo={() => ask(`${pathOf(notebook)}/move`, { body: { workshopId } }).then(done)}
    >
      {target === undefined ? (
        <p>
          You belong to no other workshop. Whoever is in both can move it, as an owner of the
          notebook.
        </p>
      ) : (
        <>
          <WorkshopChoice workshops={others} chosen={workshopId} onChange={setWorkshopId} />
          <div className="space-y-1 [overflow-wrap:anywhere]">
            <p>
              “{notebook.title}” leaves {notebook.workshop.name}. Everybody on it keeps their role,
              and revisions stay as they were issued. What changes:
            </p>
            <ul className="list-disc space-y-0.5 pl-5">
              <li>The title block follows what {target.name} has set.</li>
              <li>Its rules say who issues revisions, and whether a check is needed first.</li>
              <li>
                Its admins read in their activity record what is done to the notebook; those of{' '}
                {notebook.workshop.name} no longer do.
              </li>
              {notebook.template && (
                <li>It is no longer a template; an owner can make it one again there.</li>
              )}
            </ul>
          </div>
        </>
      )}
    </DeedForm>
  );
}

export function TemplateDialog({ notebook, onClose }: DeedProps) {
  const { template } = notebook;
  const done = useDone(onClose);
  return (
    <DeedForm
      title={template ? 'No longer a template' : 'Make it a template'}
      does={template ? 'Take it off the templates' : 'Make it a template'}
      onClose={onClose}
      onDo={() =>
        ask(`${pathOf(notebook)}/template`, {
          method: 'PATCH',
          body: { template: !template },
        }).then(done)
      }
    >
      <p className="[overflow-wrap:anywhere]">
        {template
          ? `“${notebook.title}” is no longer offered for new notebooks. Those made from it stay as they are.`
          : `Every member of ${notebook.workshop.name} may begin a notebook with the newest version of “${notebook.title}”, and so read its content. They see nothing else of it and cannot change it.`}
      </p>
    </DeedForm>
  );
}

function TitleField({ title, onChange }: { title: string; onChange: (title: string) => void }) {
  return (
    <Field
      label="Title"
      required
      autoFocus
      maxLength={TITLE_LENGTH}
      value={title}
      onChange={(event) => onChange(event.target.value)}
    />
  );
}

interface WorkshopChoiceProps {
  workshops: readonly MemberWorkshop[];
  chosen: string;
  onChange: (id: string) => void;
}

function WorkshopChoice({ workshops, chosen, onChange }: WorkshopChoiceProps) {
  return (
    <Choice label="Workshop" value={chosen} onChange={(event) => onChange(event.target.value)}>
      {workshops.map(({ id, name }) => (
        <option key={id} value={id}>
          {name}
        </option>
      ))}
    </Choice>
  );
}
