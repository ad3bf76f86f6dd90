import type { Database } from '../client';

export async function setTemplate(db: Database, id: string, template: boolean): Promise<void> {
  await db('notebooks')
    .where({ id })
    .update({ template_since: template ? db.raw('current_timestamp(3)') : null });
}

export interface Template {
  id: string;
  title: string;
  workshop: { id: string; name: string };
  /** Its newest version, which is what notebooks are made from. */
  version: number;
  changedAt: Date;
}

interface TemplateRow {
  id: string;
  title: string;
  workshop_id: string;
  workshop_name: string;
  head: number;
  changed_at: Date;
}

/** The templates of these workshops that are in use, by workshop and title. */
export async function listTemplates(
  db: Database,
  workshopIds: readonly string[],
): Promise<Template[]> {
  const rows = await db('notebooks')
    .join('workshops', 'workshops.id', 'notebooks.workshop_id')
    .whereIn('notebooks.workshop_id', workshopIds)
    .whereNotNull('notebooks.template_since')
    .whereNull('notebooks.archived_at')
    .orderBy(['workshops.name', 'workshops.id', 'notebooks.title', 'notebooks.id'])
    .select<TemplateRow[]>(
      'notebooks.id',
      'notebooks.title',
      'notebooks.workshop_id',
      'workshops.name as workshop_name',
      'notebooks.head',
      'notebooks.changed_at',
    );
  return rows.map((row) => ({
    id: row.id,
    title: row.title,
    workshop: { id: row.workshop_id, name: row.workshop_name },
    version: row.head,
    changedAt: row.changed_at,
  }));
}
