'use client';

import { useCallback, useRef, useState } from 'react';
import { problemOf, type Problem } from '@/components/ui/problem';
import type { EvidenceFile, EvidenceRole } from '@/services/contracts/evidence';
import { sendFile } from './send-file';

/** A file on its way; it leaves the list when it is attached. */
export interface Upload {
  readonly key: number;
  readonly file: File;
  readonly role: EvidenceRole;
  readonly state: 'sending' | 'stopped' | 'refused';
  /** 100 while the server reads what it got. */
  readonly percent: number;
  readonly problem?: Problem;
}

export interface Uploads {
  readonly list: readonly Upload[];
  readonly add: (files: readonly File[], role: EvidenceRole) => void;
  readonly cancel: (key: number) => void;
  readonly again: (key: number) => void;
  readonly drop: (key: number) => void;
}

/** Several files on their way at once, each with progress; one that fails can be sent again without choosing it again. */
export function useUploads(attach: (stored: EvidenceFile, role: EvidenceRole) => Promise<unknown>): Uploads {
  const [list, setList] = useState<readonly Upload[]>([]);
  const last = useRef(0);
  const cancels = useRef(new Map<number, () => void>());
  const put = useCallback(
    (key: number, next: Partial<Upload>) =>
      setList((before) => before.map((one) => (one.key === key ? { ...one, ...next } : one))),
    [],
  );
  const drop = useCallback((key: number) => setList((before) => before.filter((one) => one.key !== key)), []);
  const send = async (key: number, file: File, role: EvidenceRole) => {
    const sending = sendFile(role, file, (percent) => put(key, { percent }));
    cancels.current.set(key, sending.cancel);
    try {
      await attach(await sending.answer, role);
      drop(key);
    } catch (failure) {
      const stopped = failure instanceof DOMException && failure.name === 'AbortError';
      put(key, stopped ? { state: 'stopped' } : { state: 'refused', problem: problemOf(failure) });
    }
    cancels.current.delete(key);
  };
  return {
    list,
    drop,
    add: (files, role) => {
      for (const file of files) {
        last.current += 1;
        const key = last.current;
        setList((before) => [...before, { key, file, role, state: 'sending', percent: 0 }]);
        void send(key, file, role);
      }
    },
    cancel: (key) => cancels.current.get(key)?.(),
    again: (key) => {
      const found = list.find((one) => one.key === key);
      if (!found) return;
      put(key, { state: 'sending', percent: 0 });
      void send(key, found.file, found.role);
    },
  };
}
