'use client';

import { useEffect, useState, useSyncExternalStore } from 'react';
import { isReached, subscribeToReach } from '@/components/ui/reach';
import { ask } from '@/components/ui/ask';

/** `back` stands for a few seconds after the connection was lost, so that whoever looks away sees it. */
export type Connection = 'there' | 'lost' | 'back';

/** Milliseconds between two knocks at a server that did not answer. */
const KNOCK = 4000;
const BACK = 6000;

/** Whether the server can be reached: the browser says it is offline, or our last request had no answer. */
export function useConnection(): Connection {
  const reached = useSyncExternalStore(subscribeToReach, isReached, () => true);
  const [seen, setSeen] = useState(true);
  const [back, setBack] = useState(false);
  if (reached !== seen) {
    setSeen(reached);
    setBack(reached);
  }

  useEffect(() => {
    if (reached) return;
    const timer = setInterval(() => void ask('/api/health').catch(() => undefined), KNOCK);
    return () => clearInterval(timer);
  }, [reached]);

  useEffect(() => {
    if (!back) return;
    const timer = setTimeout(() => setBack(false), BACK);
    return () => clearTimeout(timer);
  }, [back]);

  if (!reached) return 'lost';
  return back ? 'back' : 'there';
}
