/**
 * The name of this tab of the browser, kept over a reload, and the tabs that are open: each holds a lock
 * under its name for as long as it lives. Where the browser has no locks, no other tab counts as open.
 */
const NAME = 'surdwork:tab';
const lockOf = (tab: string) => `${NAME}:${tab}`;

const newName = () => crypto.getRandomValues(new Uint32Array(2)).join('');

/** Holds the lock of a name for ever; false when another tab has it, as after a tab was doubled. */
function hold(tab: string): Promise<boolean> {
  return new Promise((resolve) => {
    void navigator.locks.request(lockOf(tab), { ifAvailable: true }, (lock) => {
      resolve(lock !== null);
      return lock === null ? undefined : new Promise<void>(() => undefined);
    });
  });
}

async function claim(): Promise<string> {
  let tab = newName();
  try {
    tab = sessionStorage.getItem(NAME) ?? tab;
    if ('locks' in navigator && !(await hold(tab))) {
      tab = newName();
      await hold(tab);
    }
    sessionStorage.setItem(NAME, tab);
  } catch {
    // Without a store the name lasts as long as the page, and so does what it names.
  }
  return tab;
}

let claimed: Promise<string> | null = null;

export function claimTab(): Promise<string> {
  claimed ??= claim();
  return claimed;
}

/** The names of all open tabs, this one among them. */
export async function listOpenTabs(): Promise<ReadonlySet<string>> {
  if (!('locks' in navigator)) return new Set();
  const { held = [] } = await navigator.locks.query();
  return new Set(
    held.flatMap(({ name = '' }) =>
      name.startsWith(lockOf('')) ? [name.slice(lockOf('').length)] : [],
    ),
  );
}
