import { SignUp, signUp } from '@/lib/accounts';
import { created, route } from '@/lib/http';

export const POST = route({ person: 'none', body: SignUp }, async ({ body, address }) =>
  created(await signUp(body, address)),
);
