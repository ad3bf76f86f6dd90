import { useEffect, useRef } from 'react';

/** Leads whoever came by a link to a cell there, whatever is folded over it; once, when the sheet has come up. */
export function useArrival(show: (cell: string) => void) {
  const latest = useRef(show);
  useEffect(() => {
    const cell = /^#cell-([A-Za-z0-9_-]+)$/.exec(window.location.hash)?.[1];
    if (cell !== undefined) latest.current(cell);
  }, []);
}
