'use client';

import { useEffect, useRef } from 'react';
import type { ScanPrefix } from '@/services/contracts/workstations';
import { characterByPlace } from './character-by-place';

// A scanner types a whole code within a fraction of this; a hand on the prefix key by mistake is forgotten after it.
const silenceMs = 600;
const longest = 200;

export interface ScannerEvents {
  readonly onScan: (text: string) => void;
  /** A code began and did not end: the scan is to be made again. */
  readonly onBroken?: () => void;
  /** Where badges are given out, one is read rather than used. */
  readonly onBadge?: (text: string) => void;
}

/**
 * Takes scans for the whole page: everything between the prefix key and Enter, read by the place of the keys and typed
 * into no field. Keys that do not follow a prefix are left alone.
 */
export function useScanner(prefix: ScanPrefix, events: ScannerEvents): void {
  const latest = useRef(events);
  useEffect(() => {
    latest.current = events;
  });
  useEffect(() => {
    let taken: string | null = null;
    let timer: ReturnType<typeof setTimeout> | undefined;
    const end = () => {
      clearTimeout(timer);
      taken = null;
    };
    const wait = () => {
      clearTimeout(timer);
      timer = setTimeout(() => {
        const broken = taken !== null && taken !== '';
        end();
        if (broken) latest.current.onBroken?.();
      }, silenceMs);
    };
    const onKey = (event: KeyboardEvent) => {
      const begins = event.code === prefix && !event.ctrlKey && !event.altKey && !event.metaKey;
      if (taken === null && !begins) return;
      event.preventDefault();
      event.stopImmediatePropagation();
      if (begins) {
        taken = '';
        wait();
        return;
      }
      if (event.code === 'Enter' || event.code === 'NumpadEnter' || event.code === 'Tab') {
        const text = (taken ?? '').trim();
        end();
        if (text !== '') latest.current.onScan(text);
        return;
      }
      const character = characterByPlace(event.code, event.shiftKey);
      if (character !== null && taken !== null && taken.length < longest) taken += character;
      wait();
    };
    // On the window and in the capturing phase: before any field or dialog sees the key.
    window.addEventListener('keydown', onKey, true);
    return () => {
      clearTimeout(timer);
      window.removeEventListener('keydown', onKey, true);
    };
  }, [prefix]);
}
