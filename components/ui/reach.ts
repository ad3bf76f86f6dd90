/** Whether our server answered the last request that went to it; told by `ask`, and by the browser. */
let answered = true;
const listeners = new Set<() => void>();

export function noteReach(reached: boolean) {
  if (reached === answered) return;
  answered = reached;
  for (const listener of listeners) listener();
}

export const isReached = () => answered && navigator.onLine;

export function subscribeToReach(listener: () => void) {
  listeners.add(listener);
  window.addEventListener('online', listener);
  window.addEventListener('offline', listener);
  return () => {
    listeners.delete(listener);
    window.removeEventListener('online', listener);
    window.removeEventListener('offline', listener);
  };
}
