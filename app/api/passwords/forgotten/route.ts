import { Forgotten, forgotPassword } from '@/lib/accounts';
import { route } from '@/lib/http';

export const POST = route({ person: 'none', body: Forgotten }, async ({ body, address }) => {
  await forgotPassword(body.email, address);
  return Response.json({}, { status: 202 });
});
