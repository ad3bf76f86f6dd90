import type { NotebookContent } from '@/lib/notebooks/content';

/**
 * What it costs the server that open sheets ask for news, against a served copy with the demo in it:
 * `npm run bench:presence -- http://127.0.0.1:3000 [people] [looks]`. So many sheets of one notebook each ask every three
 * seconds, with the tag of the answer they have, as a browser does; in every tenth round one of them saves. It reports
 * the share of answers that were 304 and how long answers took.
 */
const PAUSE = 3_000;
/** Rounds between two saves. */
const SAVES = 10;

const [address = 'http://127.0.0.1:3000', people = '20', looks = '20'] = process.argv.slice(2);
const count = Number(people);
const rounds = Number(looks);
if (![count, rounds].every((one) => Number.isInteger(one) && one > 0))
  throw new Error('People and looks are whole numbers above 0.');

const origin = new URL(address).origin;
const print = (line: string): void => void process.stdout.write(`${line}\n`);

/** The demo's people in turn: each sheet is a session of its own. */
const NAMES = ['ida', 'tam', 'wren'];

/** Signs in as next-auth's own page does and gives the cookies. */
async function signIn(name: string): Promise<string> {
  const jar = new Map<string, string>();
  const keep = (response: Response) => {
    for (const line of response.headers.getSetCookie()) {
      const [pair = ''] = line.split(';');
      jar.set(pair.slice(0, pair.indexOf('=')), pair.slice(pair.indexOf('=') + 1));
    }
  };
  const cookie = () => [...jar].map(([key, value]) => `${key}=${value}`).join('; ');
  const token = await fetch(new URL('/api/auth/csrf', address));
  keep(token);
  const { csrfToken } = (await token.json()) as { csrfToken: string };
  const form = { csrfToken, email: `${name}@ferrowick.example`, password: 'limestone-and-lime' };
  const signed = await fetch(new URL('/api/auth/callback/credentials', address), {
    method: 'POST',
    redirect: 'manual',
    headers: { cookie: cookie(), origin },
    body: new URLSearchParams({ ...form, json: 'true' }),
  });
  keep(signed);
  if (signed.status !== 200) throw new Error(`Signing in was answered ${signed.status}.`);
  return cookie();
}

const cookies = await Promise.all(NAMES.map(signIn));
const [owner = ''] = cookies;

async function send<T>(path: string, body: unknown): Promise<T> {
  const answer = await fetch(new URL(path, address), {
    method: 'POST',
    headers: { cookie: owner, origin, 'content-type': 'application/json' },
    body: JSON.stringify(body),
  });
  if (!answer.ok) throw new Error(`${path} was answered ${answer.status}.`);
  return (await answer.json()) as T;
}

const content = (size: number): NotebookContent => ({
  format: 1,
  settings: { digits: 12, unit: 'mm', step: null, rounding: 'half-even' },
  cells: [{ id: 'c', kind: 'dimension', source: `R = ${size} mm` }],
});
const { id } = await send<{ id: string }>('/api/notebooks', {
  title: `${count} sheets that ask for news`,
  content: content(1200),
});
for (const [name, role] of [
  ['tam', 'editor'],
  ['wren', 'viewer'],
])
  await send(`/api/notebooks/${id}/people`, { email: `${name}@ferrowick.example`, role });

const times: number[] = [];
let unchanged = 0;

async function watch(sheet: number) {
  const cookie = cookies[sheet % cookies.length] ?? '';
  let tag: string | null = null;
  await new Promise((resolve) => setTimeout(resolve, (PAUSE * sheet) / count));
  for (let look = 0; look < rounds; look += 1) {
    const begun = performance.now();
    const answer: Response = await fetch(new URL(`/api/notebooks/${id}/now?seen=1`, address), {
      headers: { cookie, ...(tag === null ? {} : { 'if-none-match': tag }) },
    });
    await answer.arrayBuffer();
    times.push(performance.now() - begun);
    if (answer.status === 304) unchanged += 1;
    else if (answer.status !== 200) throw new Error(`News were answered ${answer.status}.`);
    tag = answer.headers.get('etag') ?? tag;
    if (sheet === 0 && look % SAVES === SAVES - 1) {
      const base = 1 + Math.floor(look / SAVES);
      await send(`/api/notebooks/${id}/versions`, { base, content: content(1200 + base) });
    }
    await new Promise((resolve) =>
      setTimeout(resolve, Math.max(0, PAUSE - (performance.now() - begun))),
    );
  }
}

await Promise.all(Array.from({ length: count }, (_, sheet) => watch(sheet)));
const sorted = times.sort((a, b) => a - b);
const part = (share: number) => (sorted[Math.floor(sorted.length * share)] ?? 0).toFixed(1);
print(`${count} sheets, ${times.length} looks, one save in ${SAVES * (PAUSE / 1000)} s`);
print(`304: ${((100 * unchanged) / times.length).toFixed(1)} %`);
print(`answered in ${part(0.5)} ms (median), ${part(0.95)} ms (95 %)`);
await fetch(new URL(`/api/notebooks/${id}`, address), {
  method: 'PATCH',
  headers: { cookie: owner, origin, 'content-type': 'application/json' },
  body: JSON.stringify({ archived: true }),
});
