import { noteReach } from './reach';

/** A refusal of the server: the code and the plain sentence of its problem document. */
export class Refusal extends Error {
  override readonly name = 'Refusal';

  constructor(
    readonly status: number,
    readonly code: string,
    message: string,
    readonly document: Readonly<Record<string, unknown>> = {},
  ) {
    super(message);
  }
}

interface Asking {
  method?: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
  body?: unknown;
  /** Sent as it is, in place of a body in JSON. */
  file?: Blob;
  signal?: AbortSignal;
  /** Goes on when the page is left. */
  keepalive?: boolean;
}

/**
 * Asks our own server in JSON.
 * @throws Refusal with the server's sentence, or with code `unreachable` when no answer came.
 */
export async function ask<T>(
  path: string,
  { method, body, file, signal, keepalive }: Asking = {},
): Promise<T> {
  let response: Response;
  try {
    response = await fetch(path, {
      method: method ?? (body === undefined ? 'GET' : 'POST'),
      headers: { ...typed(file?.type), ...typed(body === undefined ? '' : 'application/json') },
      body: file ?? (body === undefined ? null : JSON.stringify(body)),
      signal: signal ?? null,
      keepalive: keepalive ?? false,
    });
  } catch (cause) {
    if (cause instanceof DOMException && cause.name === 'AbortError') throw cause;
    noteReach(false);
    throw new Refusal(
      0,
      'unreachable',
      'No answer came from the server; the connection may be down.',
    );
  }
  noteReach(true);
  if (response.status === 204) return undefined as T;
  const document = (await response.json().catch(() => null)) as Record<string, unknown> | null;
  if (response.ok) return document as T;
  throw new Refusal(
    response.status,
    typeof document?.code === 'string' ? document.code : 'unexpected',
    sentenceOf(document) ?? `The server answered ${response.status} without saying why.`,
    document ?? {},
  );
}

const typed = (type = ''): Record<string, string> => (type === '' ? {} : { 'content-type': type });

/** The fetcher of SWR: what stands at an address. */
export const askFor = <T>(path: string): Promise<T> => ask<T>(path);

function sentenceOf(document: Record<string, unknown> | null): string | null {
  if (typeof document?.detail === 'string') return document.detail;
  return typeof document?.title === 'string' ? document.title : null;
}

/** The sentence to show for whatever was thrown. */
export function sayFault(fault: unknown): string {
  return fault instanceof Error ? fault.message : 'Something went wrong.';
}
