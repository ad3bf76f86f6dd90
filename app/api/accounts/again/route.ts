import { SendAgain, sendConfirmationAgain } from '@/lib/accounts';
import { route } from '@/lib/http';

/** Sends the letter with the link to confirm once more. */
export const POST = route({ person: 'none', body: SendAgain }, async ({ body, address }) => {
  await sendConfirmationAgain(body, address);
  return Response.json({}, { status: 202 });
});
