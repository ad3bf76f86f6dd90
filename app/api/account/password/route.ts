import { PasswordChange, changePassword } from '@/lib/accounts';
import { currentSession } from '@/lib/accounts/session';
import { done, route } from '@/lib/http';

export const POST = route(
  { person: 'required', body: PasswordChange },
  async ({ person, body }) => {
    const session = await currentSession();
    await changePassword(person, session?.id ?? null, body);
    return done();
  },
);
