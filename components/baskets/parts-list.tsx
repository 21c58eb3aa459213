'use client';

import { useState } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { Button, LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { StateWord } from '@/components/ui/state-word';
import { VerdictMark } from '@/components/ui/verdict-mark';
import { When } from '@/components/ui/when';
import type { BasketAnswer, BasketPart } from '@/services/contracts/baskets';
import { ReasonDialog } from './reason-dialog';

const leaves = (part: BasketPart) =>
  part.verdict === 'reject' || part.verdict === 'indeterminate' || part.verdict === 'not-evaluable';

/** Does somebody have to look at this row? Those stand first. */
function isException({ mark, held, verdict }: BasketPart): boolean {
  return (
    held || mark === 'marked' || mark === 'given-up' || mark === 'signed-apart' || (verdict !== null && verdict !== 'accept')
  );
}

/** Exceptions first, then the newest scan. */
export function inReadingOrder(parts: readonly BasketPart[]): BasketPart[] {
  return [...parts].sort((a, b) => {
    const first = Number(isException(b)) - Number(isException(a));
    return first !== 0 ? first : a.scannedAt < b.scannedAt ? 1 : -1;
  });
}

interface RowProps {
  readonly basket: BasketAnswer;
  readonly part: BasketPart;
  readonly writable: boolean;
  readonly onTakeOut: (part: BasketPart) => void;
}

function Row({ basket, part, writable, onTakeOut }: RowProps) {
  const t = useMessages('baskets');
  const inBasket = part.mark === 'clean' || part.mark === 'marked';
  const shapes = {
    clean: { glyph: 'accept', tone: 'accept' },
    marked: { glyph: 'half-disc', tone: 'unsure' },
    'signed-apart': { glyph: 'leaving', tone: 'accent' },
    'given-up': { glyph: 'cross', tone: 'soft' },
    'taken-out': { glyph: 'leaving', tone: 'soft' },
    signed: { glyph: 'closed', tone: 'accept' },
  } as const;
  return (
    <li
      data-part={part.serial}
      data-mark={part.mark}
      className="grid grid-cols-[minmax(6rem,1fr)_minmax(0,2fr)_auto] items-center gap-3 border-b border-line px-3 py-1 last:border-b-0"
    >
      <span className="font-mono text-lg">{part.serial}</span>
      <span className="flex min-w-0 flex-wrap items-baseline gap-x-3">
        {part.held ? <StateWord state="held" /> : null}
        {part.verdict === null || part.verdict === 'accept' ? (
          <StateWord state={part.mark} word={t(`marks.${part.mark}`)} {...shapes[part.mark]} />
        ) : (
          <VerdictMark verdict={part.verdict} />
        )}
        <span className="text-sm text-ink-soft">
          <When at={part.scannedAt} to="minute" /> {part.reason}
        </span>
      </span>
      <span className="flex gap-2">
        {part.number !== null && leaves(part) ? (
          <LinkButton size="capture" href={`/baskets/${basket.id}/tags#${part.serial}`}>
            {t('tag')} <span className="sr-only">{part.serial}</span>
          </LinkButton>
        ) : null}
        <LinkButton size="capture" href={`/inspections/${part.inspection}`}>
          {writable && inBasket ? t('mark') : t('look1')} <span className="sr-only">{part.serial}</span>
        </LinkButton>
        {writable && inBasket ? (
          <Button size="capture" onClick={() => onTakeOut(part)}>
            {t('takeOut')} <span className="sr-only">{part.serial}</span>
          </Button>
        ) : null}
      </span>
    </li>
  );
}

/** The parts of a basket in a list of its own height; what needs a look stands first. */
export function PartsList({
  basket,
  writable,
  onChange,
}: {
  basket: BasketAnswer;
  writable: boolean;
  onChange: (answer: BasketAnswer) => void;
}) {
  const t = useMessages('baskets');
  const [out, setOut] = useState<BasketPart | null>(null);
  return (
    <section
      aria-label={t('list')}
      tabIndex={0}
      className="relative min-h-0 flex-1 overflow-y-auto rounded border border-line bg-raised"
    >
      {basket.parts.length === 0 ? (
        <EmptyState title={t('nothing')}>{t('scanHere')}</EmptyState>
      ) : (
        <ol>
          {inReadingOrder(basket.parts).map((part) => (
            <Row key={part.inspection} basket={basket} part={part} writable={writable} onTakeOut={setOut} />
          ))}
        </ol>
      )}
      <ReasonDialog
        open={out !== null}
        title={t('takeOutTitle', { serial: out?.serial ?? '' })}
        does={t('takeOut')}
        url={`/api/baskets/${basket.id}/parts/${out?.part ?? ''}/removal`}
        onDone={(answer) => {
          setOut(null);
          onChange(answer);
        }}
        onClose={() => setOut(null)}
      />
    </section>
  );
}
