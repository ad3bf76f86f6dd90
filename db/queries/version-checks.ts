import type { Database } from '../client';

/** That a person has checked a version. */
export interface VersionCheck {
  version: number;
  person: { id: string; name: string };
  checkedAt: Date;
  remark: string | null;
}

interface CheckRow {
  version: number;
  person_id: string;
  person_name: string;
  checked_at: Date;
  remark: string | null;
}

const toCheck = (row: CheckRow): VersionCheck => ({
  version: row.version,
  person: { id: row.person_id, name: row.person_name },
  checkedAt: row.checked_at,
  remark: row.remark,
});

/** The checks of all versions of a notebook, or of one of them, oldest first. */
export async function listVersionChecks(
  db: Database,
  notebookId: string,
  version?: number,
): Promise<VersionCheck[]> {
  const query = db('version_checks')
    .join('users', 'users.id', 'version_checks.person_id')
    .where('version_checks.notebook_id', notebookId)
    .orderBy(['version_checks.version', 'version_checks.checked_at', 'version_checks.person_id'])
    .select<CheckRow[]>('version_checks.*', 'users.name as person_name');
  if (version !== undefined) void query.where('version_checks.version', version);
  return (await query).map(toCheck);
}

export interface NewVersionCheck {
  notebookId: string;
  version: number;
  personId: string;
  remark: string | null;
  /** Now when left out. */
  checkedAt?: Date;
}

/** @throws what `isDuplicate` recognises when the person has checked this version already */
export async function insertVersionCheck(db: Database, check: NewVersionCheck): Promise<Date> {
  const checkedAt = check.checkedAt ?? new Date();
  await db('version_checks').insert({
    notebook_id: check.notebookId,
    version: check.version,
    person_id: check.personId,
    checked_at: checkedAt,
    remark: check.remark,
  });
  return checkedAt;
}
