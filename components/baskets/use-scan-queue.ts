'use client';

import { useCallback, useEffect, useRef, useState } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { problemOf, type Problem } from '@/components/ui/problem';
import type { ScanAnswer } from '@/services/contracts/baskets';
import { dropScan, keepScan, newKey, nowMs, readWaiting, type WaitingScan } from './scan-store';

/** How a scan ended: the server's answer, or its refusal with `why`. */
export type ScanEnd =
  | { readonly kind: 'answer'; readonly scan: string; readonly answer: ScanAnswer }
  | { readonly kind: 'refusal'; readonly scan: string; readonly why: string; readonly problem: Problem };

export interface ScanQueue {
  readonly waiting: readonly WaitingScan[];
  /** Why the first of them is not through yet; undefined while it is on its way. */
  readonly stuck: Problem | undefined;
  /** The browser keeps nothing: a reload would lose what waits. */
  readonly unkept: boolean;
  readonly add: (scan: string) => void;
}

const retryMs = 1500;
// Below this a wait is the ordinary way of a request, and the act is the moment it arrives.
const worthSayingMs = 1000;

// No answer, a server that is down, too many at once, or nobody signed in: the scan stays and is sent again.
function comesBack({ status }: Problem): boolean {
  return status === 0 || status >= 500 || status === 429 || status === 401 || status === 408;
}

/**
 * Sends scans one after another, in order, each with its key, and keeps them in the browser until they are acknowledged:
 * a cut network, a reload or a closed browser neither loses nor doubles one.
 */
export function useScanQueue(personId: string, basketId: string, onEnd: (end: ScanEnd) => void): ScanQueue {
  const [waiting, setWaiting] = useState<readonly WaitingScan[]>([]);
  const [stuck, setStuck] = useState<Problem>();
  const [unkept, setUnkept] = useState(false);
  const queue = useRef<WaitingScan[]>([]);
  const sending = useRef(false);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const ended = useRef(onEnd);
  useEffect(() => {
    ended.current = onEnd;
  });
  const send = useCallback(async (): Promise<void> => {
    clearTimeout(timer.current);
    if (sending.current) return;
    sending.current = true;
    for (let first = queue.current[0]; first !== undefined; first = queue.current[0]) {
      const { key, scan, atMs } = first;
      const waitedMs = Math.round(nowMs() - atMs);
      const headers = { 'idempotency-key': key, ...(waitedMs > worthSayingMs ? { 'scan-waited-ms': String(waitedMs) } : {}) };
      let end: ScanEnd;
      try {
        const answer = await sendJson<ScanAnswer>(`/api/baskets/${basketId}/parts`, { body: { scan }, headers });
        end = { kind: 'answer', scan, answer };
      } catch (failure) {
        const problem = problemOf(failure);
        if (comesBack(problem)) {
          setStuck(problem);
          timer.current = setTimeout(() => void sendRef.current(), retryMs);
          break;
        }
        end = { kind: 'refusal', scan, why: (problem as Problem & { why?: string }).why ?? 'refused', problem };
      }
      queue.current = queue.current.filter((one) => one.key !== key);
      dropScan(personId, basketId, key);
      setWaiting([...queue.current]);
      setStuck(undefined);
      ended.current(end);
    }
    sending.current = false;
  }, [personId, basketId]);
  const sendRef = useRef(send);
  useEffect(() => {
    sendRef.current = send;
  });
  useEffect(() => {
    queue.current = readWaiting(personId, basketId);
    setWaiting([...queue.current]);
    void send();
    const online = () => void send();
    window.addEventListener('online', online);
    return () => {
      window.removeEventListener('online', online);
      clearTimeout(timer.current);
    };
  }, [personId, basketId, send]);
  const add = useCallback(
    (scan: string) => {
      const one = { key: newKey(), scan, atMs: nowMs() };
      setUnkept(!keepScan(personId, basketId, one));
      queue.current = [...queue.current, one];
      setWaiting([...queue.current]);
      void send();
    },
    [personId, basketId, send],
  );
  return { waiting, stuck, unkept, add };
}
