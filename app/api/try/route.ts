import { route } from '@/lib/http';
import { TryRequest, tryLines } from '@/lib/notebooks';

/** Most bytes of a request: its few lines, every character of them escaped. */
const TRY_BODY = 4 * 1024;

export const POST = route(
  { person: 'none', body: TryRequest, bodyLimit: TRY_BODY },
  async ({ body, address }) => tryLines(body, address),
);
