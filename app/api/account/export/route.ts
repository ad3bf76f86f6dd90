import { exportAccount } from '@/lib/accounts';
import { download, route } from '@/lib/http';

export const GET = route({ person: 'required' }, async ({ person }) =>
  download(
    JSON.stringify(await exportAccount(person), null, 2),
    'application/json',
    'surdwork account.json',
  ),
);
