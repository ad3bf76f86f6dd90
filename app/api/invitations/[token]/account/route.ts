import { created, route } from '@/lib/http';
import { InvitedAccount, acceptWithNewAccount } from '@/lib/workshops';

/** Makes an account for the invited address and accepts in its name. */
export const POST = route(
  { person: 'none', body: InvitedAccount },
  async ({ part, body, address }) =>
    created(await acceptWithNewAccount(part('token'), body, address)),
);
