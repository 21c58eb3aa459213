'use client';

import { useRouter } from 'next/navigation';
import { useRef, useState } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { Glyph } from '@/components/ui/glyph';
import { KeyHint } from '@/components/ui/key-hint';
import { usePageKey } from './use-page-key';

/** Finds a serial from anywhere; `/` comes here. */
export function SerialSearch() {
  const t = useMessages('shell');
  const router = useRouter();
  const input = useRef<HTMLInputElement>(null);
  const [serial, setSerial] = useState('');
  usePageKey('/', () => {
    input.current?.focus();
    input.current?.select();
  });
  return (
    <form
      role="search"
      className="relative w-full max-w-72"
      onSubmit={(event) => {
        event.preventDefault();
        if (serial.trim() !== '') router.push(`/parts?serial=${encodeURIComponent(serial.trim())}`);
      }}
    >
      <span aria-hidden className="pointer-events-none absolute inset-y-0 left-3 flex items-center text-ink-soft">
        <Glyph name="search" />
      </span>
      <input
        ref={input}
        type="search"
        name="serial"
        value={serial}
        onChange={(event) => setSerial(event.target.value)}
        aria-label={t('search')}
        aria-keyshortcuts="/"
        placeholder={t('search')}
        autoComplete="off"
        spellCheck={false}
        className="field pr-9 pl-9 font-mono placeholder:font-sans"
      />
      <span aria-hidden className="pointer-events-none absolute inset-y-0 right-2 flex items-center pointer-coarse:hidden">
        {serial === '' && <KeyHint keys={['/']} />}
      </span>
    </form>
  );
}
