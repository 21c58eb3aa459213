'use client';

import Link from 'next/link';
import type { ReactNode } from 'react';
import { Decimal } from '@/components/ui/decimal';
import { Ring } from '@/components/ui/ring';
import { StateWord } from '@/components/ui/state-word';
import { VerdictMark } from '@/components/ui/verdict-mark';
import { When } from '@/components/ui/when';
import type { GridColumn } from './grid-columns';

const none = <span className="text-ink-soft">–</span>;

/** What a cell of each kind shows. A row that is still on its way shows three dots. */
export function GridCell<Row>({
  column,
  row,
  href,
}: {
  column: GridColumn<Row>;
  row: Row | undefined;
  href: string | undefined;
}): ReactNode {
  if (row === undefined) return <span className="text-ink-soft">…</span>;
  switch (column.kind) {
    case 'ring': {
      const { segments, held, text } = column.value(row);
      return (
        <span className="flex h-full items-center gap-3">
          <Ring segments={segments} held={held} pixels={28} />
          {text !== undefined && <span className="truncate">{text}</span>}
        </span>
      );
    }
    case 'serial': {
      const serial = column.value(row);
      if (serial === null) return none;
      return href === undefined ? (
        <span className="font-mono">{serial}</span>
      ) : (
        <Link
          href={href}
          tabIndex={-1}
          className="font-mono font-semibold text-accent underline decoration-line-strong underline-offset-4"
        >
          {serial}
        </Link>
      );
    }
    case 'link': {
      const link = column.value(row);
      return link === null ? (
        none
      ) : (
        <Link href={link.href} tabIndex={-1} className="text-accent underline decoration-line-strong underline-offset-4">
          {link.text}
        </Link>
      );
    }
    case 'state': {
      const state = column.value(row);
      return state === null ? none : <StateWord state={state} />;
    }
    case 'verdict': {
      const verdict = column.value(row);
      return verdict === null ? none : <VerdictMark verdict={verdict} />;
    }
    case 'decimal':
      return <Decimal value={column.value(row)} unit={column.unit} places={column.places} />;
    case 'when':
      return <When at={column.value(row)} to={column.to} />;
    case 'count':
      return <span className="font-mono">{column.value(row) ?? '–'}</span>;
    case 'text':
      return <span className="truncate">{column.value(row) ?? '–'}</span>;
  }
}
