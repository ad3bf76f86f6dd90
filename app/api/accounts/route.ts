import { SignUp, signUp } from '@/lib/accounts';
import { route } from '@/lib/http';

export const POST = route({ person: 'none', body: SignUp }, async ({ body, address }) =>
  Response.json(await signUp(body, address), { status: 202 }),
);
