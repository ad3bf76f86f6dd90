import { baseUrl } from './server';

/** Stops at once, with a reason, where the tests of a served copy would all fail one by one. */
export async function setup(): Promise<void> {
  const response = await fetch(baseUrl());
  if (response.status >= 500) {
    throw new Error(`The served copy at ${baseUrl()} answers ${response.status}.`);
  }
}
