import { oneLine } from '@/lib/accounts';

/** The title of a notebook. */
export const Title = oneLine('The title', 200);
