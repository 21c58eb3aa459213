'use client';

import { useCallback, useEffect, useRef, useState } from 'react';
import { ScanSender, type QueueState, type ScanEnd } from './scan-sender';

export interface ScanQueue extends QueueState {
  readonly add: (scan: string) => void;
}

/** The queue of this person's scans for this basket, for as long as the page is open. */
export function useScanQueue(personId: string, basketId: string, onEnd: (end: ScanEnd) => void): ScanQueue {
  const [state, setState] = useState<QueueState>({ waiting: [], stuck: undefined, unkept: false });
  const sender = useRef<ScanSender>(null);
  const ended = useRef(onEnd);
  useEffect(() => {
    ended.current = onEnd;
  });
  useEffect(() => {
    const one = new ScanSender(personId, basketId, { changed: setState, ended: (end) => ended.current(end) });
    sender.current = one;
    const online = () => void one.send();
    window.addEventListener('online', online);
    return () => {
      window.removeEventListener('online', online);
      one.stop();
    };
  }, [personId, basketId]);
  const add = useCallback((scan: string) => sender.current?.add(scan), []);
  return { ...state, add };
}
