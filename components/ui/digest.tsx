'use client';

import { useState } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { Glyph } from './glyph';

export interface DigestProps {
  /** Hexadecimal, in full. */
  value: string;
  /** Shows all of it, in groups of eight. */
  full?: boolean;
}

/** A SHA-256 or similar: first and last eight digits, the whole of it to copy. */
export function Digest({ value, full = false }: DigestProps) {
  const t = useMessages('ui');
  const [copied, setCopied] = useState(false);
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(value);
      setCopied(true);
    } catch {
      // Without permission nothing is copied; the value stays selectable in full by its title.
      setCopied(false);
    }
  };
  const shown = full || value.length <= 20 ? (value.match(/.{1,8}/g) ?? []).join(' ') : `${value.slice(0, 8)}…${value.slice(-8)}`;
  return (
    <span className="inline-flex items-baseline gap-1.5 font-mono">
      <span title={value} className={full ? 'break-words' : 'whitespace-nowrap'}>
        {shown}
      </span>
      <button
        type="button"
        data-print="hide"
        onClick={() => void copy()}
        aria-label={copied ? t('copied') : t('copyDigest')}
        className="grid min-h-6 min-w-6 place-items-center self-center rounded text-ink-soft hover:text-accent"
      >
        <Glyph name={copied ? 'accept' : 'copy'} pixels={14} />
      </button>
      <span role="status" className="sr-only">
        {copied ? t('copied') : ''}
      </span>
    </span>
  );
}
