'use client';

import { Dialog } from '@/components/ui/dialog';
import { KEY_GROUPS, KEYS } from '../cell-keys';

/** How a key is called on the keyboard at hand. */
function nameKey(part: string, mac: boolean): string {
  if (part === 'Mod') return mac ? '⌘' : 'Ctrl';
  if (!mac) return part;
  return { Alt: '⌥', Shift: '⇧' }[part] ?? part;
}

function Chord({ written, mac }: { written: string; mac: boolean }) {
  return (
    <span className="inline-flex gap-0.5">
      {written.split('+').map((part) => (
        <kbd
          key={part}
          className="min-w-6 border border-rule bg-limestone px-1.5 text-center font-mono text-small"
        >
          {nameKey(part, mac)}
        </kbd>
      ))}
    </span>
  );
}

/** Every key of the sheet in groups; the table behind it is the one that the keys themselves obey. */
export function KeysDialog({ onClose }: { onClose: () => void }) {
  const mac = /Mac|iPhone|iPad/.test(navigator.platform);
  return (
    <Dialog title="Keys of the sheet" onClose={onClose} wide reading>
      <div className="gap-x-10 md:columns-2">
        {KEY_GROUPS.map((group) => (
          <section key={group} className="mb-5 break-inside-avoid" aria-label={group}>
            <h3 className="border-b border-rule pb-0.5 text-small font-semibold">{group}</h3>
            <dl>
              {KEYS.filter((entry) => entry.group === group).map(({ keys, does }) => (
                <div
                  key={does}
                  className="grid grid-cols-[minmax(0,1fr)_auto] items-baseline gap-x-4 border-b border-hairline py-1"
                >
                  <dt className="order-2 flex max-w-48 flex-wrap justify-end gap-x-2 gap-y-1">
                    {keys.map((written) => (
                      <Chord key={written} written={written} mac={mac} />
                    ))}
                  </dt>
                  <dd className="text-base">{does}</dd>
                </div>
              ))}
            </dl>
          </section>
        ))}
      </div>
    </Dialog>
  );
}
