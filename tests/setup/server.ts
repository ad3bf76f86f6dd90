import knex, { type Knex } from 'knex';
import { connectionOptions } from '@/db/connection';

/** Address of the served copy under test, without a slash at its end. */
export function baseUrl(): string {
  return fromEnvironment('TEST_BASE_URL');
}

/** A client of the database that the served copy works on; the caller destroys it. */
export function openDatabase(): Knex {
  return knex(connectionOptions(fromEnvironment('TEST_DATABASE_URL')));
}

function fromEnvironment(name: string): string {
  const value = process.env[name];
  if (value !== undefined) return value;
  throw new Error(`${name} is not set; “npm test -- <files>” builds, serves and sets it.`);
}
