'use client';

import { useEffect, useId, useRef } from 'react';
import type { ReactNode } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { Glyph } from './glyph';

export interface DialogProps {
  open: boolean;
  onClose: () => void;
  title: ReactNode;
  children: ReactNode;
  /** Buttons at the foot. */
  actions?: ReactNode;
  width?: 'normal' | 'wide';
}

/** The browser's own modal dialog: focus stays inside, Escape closes, focus returns to where it was. */
export function Dialog({ open, onClose, title, children, actions, width = 'normal' }: DialogProps) {
  const t = useMessages('ui');
  const element = useRef<HTMLDialogElement>(null);
  const id = useId();
  useEffect(() => {
    const dialog = element.current;
    if (!dialog) return;
    if (open && !dialog.open) dialog.showModal();
    if (!open && dialog.open) dialog.close();
  }, [open]);
  return (
    <dialog
      ref={element}
      aria-labelledby={id}
      onClose={onClose}
      className={`max-h-[90dvh] w-full rounded border border-line-strong bg-raised text-ink ${width === 'wide' ? 'max-w-4xl' : 'max-w-xl'}`}
    >
      {open && (
        <>
          <header className="flex items-center justify-between gap-4 border-b border-line px-5 py-2">
            <h2 id={id} className="text-lg font-semibold">
              {title}
            </h2>
            <button
              type="button"
              onClick={onClose}
              aria-label={t('close')}
              className="control grid min-h-10 min-w-10 place-items-center rounded text-ink-soft hover:bg-accent-wash hover:text-ink"
            >
              <Glyph name="away" />
            </button>
          </header>
          <div className="px-5 py-4">{children}</div>
          {actions !== undefined && (
            <footer className="flex flex-wrap justify-end gap-2 border-t border-line px-5 py-3">{actions}</footer>
          )}
        </>
      )}
    </dialog>
  );
}
