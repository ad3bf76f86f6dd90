import { Confirmation, confirmSignUp } from '@/lib/accounts';
import { created, route } from '@/lib/http';

export const POST = route({ person: 'none', body: Confirmation }, async ({ body, address }) =>
  created(await confirmSignUp(body.token, address)),
);
