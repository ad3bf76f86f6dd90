import { Reset, resetPassword } from '@/lib/accounts';
import { done, route } from '@/lib/http';

export const POST = route({ person: 'none', body: Reset }, async ({ body, address }) => {
  await resetPassword(body, address);
  return done();
});
