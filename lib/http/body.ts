import { z } from 'zod';
import { Failure, type FieldFault } from '@/lib/access';

/** Enough for every request that carries no notebook. */
export const SMALL_BODY = 16 * 1024;
/** A notebook at its limits, every character of it escaped, and room to spare. */
export const NOTEBOOK_BODY = 8 * 1024 * 1024;

/**
 * The JSON body of a request, read no further than `limit` bytes.
 * @throws Failure `wrong-type`, `too-large`, `unreadable`
 */
export async function readJson(request: Request, limit: number): Promise<unknown> {
  const type = request.headers.get('content-type')?.split(';')[0]?.trim().toLowerCase() ?? '';
  if (type !== 'application/json') {
    const met = type === '' ? 'no content type' : `“${type.slice(0, 80)}”`;
    throw new Failure('wrong-type', `The request has ${met}; expected application/json.`);
  }
  const bytes = await readBytes(request, limit);
  try {
    return JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(bytes)) as unknown;
  } catch {
    const met = bytes.length === 0 ? 'The request is empty' : 'The request is not valid JSON';
    throw new Failure('unreadable', `${met}; expected one JSON object in UTF-8.`);
  }
}

/**
 * The fields of a form that a page sends without a script; of a field given twice the last one.
 * @throws Failure `wrong-type`, `too-large`
 */
export async function readForm(request: Request): Promise<Record<string, string>> {
  const type = request.headers.get('content-type')?.split(';')[0]?.trim().toLowerCase() ?? '';
  if (type !== 'application/x-www-form-urlencoded') {
    const met = type === '' ? 'no content type' : `“${type.slice(0, 80)}”`;
    throw new Failure('wrong-type', `The request has ${met}; expected the form of the page.`);
  }
  const bytes = await readBytes(request, SMALL_BODY);
  return Object.fromEntries(new URLSearchParams(bytes.toString('utf8')));
}

/** The body of a request, read no further than `limit` bytes. @throws Failure `too-large` */
export async function readBytes(request: Request, limit: number): Promise<Buffer> {
  const announced = Number(request.headers.get('content-length') ?? 0);
  if (announced > limit) throw tooLarge(`${announced} bytes`, limit);
  const chunks: Uint8Array[] = [];
  let met = 0;
  for await (const chunk of (request.body ?? []) as AsyncIterable<Uint8Array>) {
    met += chunk.length;
    if (met > limit) throw tooLarge(`more than ${limit} bytes`, limit);
    chunks.push(chunk);
  }
  return Buffer.concat(chunks);
}

const tooLarge = (met: string, limit: number) =>
  new Failure('too-large', `The request has ${met}; at most ${limit} are allowed.`);

/**
 * Checks what was sent against a schema.
 * @throws Failure `invalid`, with a plain sentence for each field that was not as expected
 */
export function check<S extends z.ZodType>(schema: S, sent: unknown): z.output<S> {
  const read = schema.safeParse(sent, { reportInput: true });
  if (read.success) return read.data;
  const fields = faultsOf(read.error);
  const [first] = fields;
  const more = fields.length - 1;
  const rest = more > 0 ? ` (and ${more} more)` : '';
  throw new Failure('invalid', `${sentence(first)}${rest}`, { fields });
}

/** Of a request with thousands of faults the first few are enough to mend it. */
const FAULTS_SHOWN = 20;

function faultsOf(error: z.ZodError): FieldFault[] {
  return error.issues
    .slice(0, FAULTS_SHOWN)
    .map((issue) => ({ field: issue.path.map(String).join('.'), message: wordsFor(issue) }));
}

function sentence(fault: FieldFault | undefined): string {
  if (fault === undefined) return 'The request is not as expected.';
  return fault.field === '' ? fault.message : `${fault.field}: ${fault.message}`;
}

/** zod's own sentences where a schema gives none of its own, in the words people use here. */
function wordsFor(issue: z.core.$ZodIssue): string {
  const custom = issue.message;
  if (issue.code === 'unrecognized_keys') {
    const names = issue.keys.slice(0, 5).map((key) => `“${key.slice(0, 40)}”`);
    return `There is no field ${names.join(', ')} here.`;
  }
  if (issue.code === 'invalid_type' && custom.startsWith('Invalid input')) {
    if (issue.input === undefined) return `It is missing; expected ${nameOf(issue.expected)}.`;
    return `It is ${kindOf(issue.input)}; expected ${nameOf(issue.expected)}.`;
  }
  if (issue.code === 'invalid_value' && custom.startsWith('Invalid')) {
    return `It is not one of ${issue.values.map(String).join(', ')}.`;
  }
  if (issue.code === 'too_big' && custom.startsWith('Too big')) return tooBig(issue);
  return custom;
}

function tooBig(issue: z.core.$ZodIssueTooBig): string {
  const { input, maximum } = issue;
  if (typeof input === 'string') {
    return `It has ${input.length} characters; at most ${maximum} are allowed.`;
  }
  if (Array.isArray(input))
    return `It has ${input.length} entries; at most ${maximum} are allowed.`;
  return `It is above ${maximum}, which is the most that is allowed.`;
}

const NAMES: Readonly<Record<string, string>> = {
  object: 'an object',
  array: 'a list',
  string: 'a text',
  number: 'a number',
  int: 'a whole number',
  boolean: 'true or false',
  null: 'null',
};

const nameOf = (type: string) => NAMES[type] ?? type;

function kindOf(value: unknown): string {
  if (value === null) return 'null';
  if (Array.isArray(value)) return 'a list';
  return nameOf(typeof value);
}
