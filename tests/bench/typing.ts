import { chromium, type Page } from 'playwright-core';
import type { NotebookContent } from '@/lib/notebooks/content';

/**
 * How fast the sheet answers a keystroke with many cells on it, measured by the browser itself against a served copy
 * with the demo in it: `npm run bench:typing -- http://127.0.0.1:3000 [cells]`. It makes a notebook, types into a
 * cell in its middle as a quick typist does, and reports
 * - keystroke to next paint (Event Timing, steps of 8 ms) and the longest of them,
 * - the gaps between frames while typing (requestAnimationFrame),
 * - tasks of the page's main thread from Chromium's trace, those longer than a frame and longer than 50 ms.
 */
const FRAME = 1000 / 60;
const KEYS = 120;
/** Milliseconds between keystrokes: ten a second. */
const PAUSE = 100;

const [address = 'http://127.0.0.1:3000', count = '300'] = process.argv.slice(2);
const cells = Number(count);
if (!Number.isInteger(cells) || cells < 10) throw new Error('The number of cells is 10 or more.');

/** Every tenth cell is a note, every thirtieth a section; each dimension cell reads one of the first ten. */
function manyCells(): NotebookContent {
  return {
    format: 1,
    settings: { digits: 12, unit: 'mm', step: '0.5 mm', rounding: 'half-even' },
    cells: Array.from({ length: cells }, (_, at) => {
      const id = `c${at}`;
      if (at > 0 && at % 30 === 0) return { id, kind: 'section', source: `Course ${at / 30}` };
      if (at % 10 === 9)
        return { id, kind: 'note', source: `Stones of row ${at}, from the **datum**.` };
      const source =
        at < 9
          ? `R${at} = ${1200 + at} mm`
          : `s${at} = R${at % 9} sqrt(${at} - sqrt(${(at % 7) + 2}))`;
      return { id, kind: 'dimension', source };
    }),
  };
}

async function signIn(page: Page) {
  await page.goto('/sign-in', { waitUntil: 'networkidle' });
  await page.getByLabel('E-mail address').fill('ida@ferrowick.example');
  await page.getByLabel('Password').fill('limestone-and-lime');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL('**/notebooks');
}

interface Watched {
  frames: number[];
  keys: number[];
}

/** Notes, in the page, the frames and how long each keystroke took to be painted; text, so that no compiler touches it. */
const WATCH = `
  window.watched = { frames: [], keys: [], stop: false };
  new PerformanceObserver((list) => {
    for (const entry of list.getEntries()) {
      if (entry.name === 'keydown') window.watched.keys.push(entry.duration);
    }
  }).observe({ type: 'event', durationThreshold: 16 });
  let last = performance.now();
  requestAnimationFrame(function frame(now) {
    window.watched.frames.push(now - last);
    last = now;
    if (!window.watched.stop) requestAnimationFrame(frame);
  });
`;

interface TraceEvent {
  name: string;
  ph: string;
  dur?: number;
  pid: number;
  tid: number;
  args?: { name?: string };
}

/** Milliseconds of each task that the main threads of pages ran. */
function mainTasks(events: readonly TraceEvent[]): number[] {
  const mains = new Set(
    events
      .filter(({ name, args }) => name === 'thread_name' && args?.name === 'CrRendererMain')
      .map(({ pid, tid }) => `${pid}:${tid}`),
  );
  return events
    .filter(
      ({ name, ph, pid, tid }) => ph === 'X' && /RunTask/.test(name) && mains.has(`${pid}:${tid}`),
    )
    .map(({ dur = 0 }) => dur / 1000);
}

const sorted = (values: readonly number[]) => [...values].sort((a, b) => a - b);
const part = (values: readonly number[], share: number) =>
  sorted(values)[Math.min(values.length - 1, Math.floor(values.length * share))] ?? 0;
const print = (line: string): void => void process.stdout.write(`${line}\n`);

const say = (value: number) => `${value.toFixed(1)} ms`;

const browser = await chromium.launch({
  executablePath: process.env.TEST_CHROMIUM ?? '/usr/bin/chromium',
  args: ['--no-sandbox', '--disable-gpu', '--disable-dev-shm-usage'],
});
try {
  const page = await browser.newPage({ baseURL: address, viewport: { width: 1440, height: 900 } });
  await signIn(page);
  const made = await page.request.post('/api/notebooks', {
    headers: { origin: address },
    data: { title: `Typing among ${cells} cells`, content: manyCells() },
  });
  const { id } = (await made.json()) as { id: string };
  await page.goto(`/notebooks/${id}`, { waitUntil: 'networkidle' });

  const middle = Math.floor(cells / 2) + 1;
  await page.locator(`#entry-c${middle}-0`).click();
  await page.locator('.cm-content').waitFor();
  await page.keyboard.press('End');
  await page.waitForTimeout(1500);

  await browser.startTracing(page, { categories: ['toplevel', 'devtools.timeline', '__metadata'] });
  await page.evaluate(WATCH);
  const text = ' + 1 mm + 2 mm'.repeat(10).slice(0, KEYS);
  for (const key of text) {
    await page.keyboard.type(key);
    await page.waitForTimeout(PAUSE);
  }
  const watched = await page.evaluate<Watched>('(window.watched.stop = true, window.watched)');
  const trace = JSON.parse((await browser.stopTracing()).toString()) as {
    traceEvents: TraceEvent[];
  };

  const tasks = mainTasks(trace.traceEvents);
  const slowKeys = watched.keys;
  const keys = [...Array<number>(Math.max(0, KEYS - slowKeys.length)).fill(8), ...slowKeys];
  const { frames } = watched;
  print(`${cells} cells, ${KEYS} keystrokes at ${1000 / PAUSE} a second`);
  print(
    `keystroke to paint: median ${say(part(keys, 0.5))}, 95 % ${say(part(keys, 0.95))}, longest ${say(part(keys, 1))}`,
  );
  print(
    `between frames: median ${say(part(frames, 0.5))}, 95 % ${say(part(frames, 0.95))}, longest ${say(part(frames, 1))}; ` +
      `${frames.filter((gap) => gap > 1.5 * FRAME).length} of ${frames.length} missed a frame`,
  );
  print(
    `main thread: ${tasks.filter((task) => task > FRAME).length} tasks longer than a frame, ` +
      `${tasks.filter((task) => task > 50).length} longer than 50 ms, longest ${say(part(tasks, 1))}`,
  );
  await page.request.patch(`/api/notebooks/${id}`, {
    headers: { origin: address },
    data: { archived: true },
  });
} finally {
  await browser.close();
}
