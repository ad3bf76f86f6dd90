import 'server-only';
import { notFound } from 'next/navigation';
import { Failure } from '@/lib/access';

/** What a service answers; what it does not find, or does not show, is the page that says so. */
export async function orNotFound<T>(answer: Promise<T>): Promise<T> {
  try {
    return await answer;
  } catch (fault) {
    if (fault instanceof Failure && (fault.code === 'not-found' || fault.code === 'forbidden'))
      notFound();
    throw fault;
  }
}
