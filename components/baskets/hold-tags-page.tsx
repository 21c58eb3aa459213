'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Button, LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { Glyph } from '@/components/ui/glyph';
import { PageHeader } from '@/components/ui/page-header';
import { When } from '@/components/ui/when';
import type { HoldTag } from '@/services/contracts/baskets';

const words = { reject: 'tagRejected', indeterminate: 'tagUndecided', 'not-evaluable': 'tagVoid' } as const;

/** One tag of 100 × 60 mm: what a person reads first, the code for the scanner beside it. */
function Tag({ tag }: { tag: HoldTag }) {
  const t = useMessages('baskets');
  const side = tag.code.modules + 2;
  return (
    <li id={tag.serial} className="hold-tag flex flex-col justify-between border-2 border-ink bg-surface p-[2mm] text-ink">
      <div className="flex items-center justify-between gap-2 border-b-2 border-ink pb-[1mm]">
        <strong className="flex items-center gap-2 text-2xl leading-none tracking-widest">
          <Glyph name="hatch" pixels={26} />
          {t('tagHold')}
        </strong>
        <strong className="text-lg leading-none">{t(words[tag.verdict])}</strong>
      </div>
      <div className="flex items-center justify-between gap-3">
        <div className="min-w-0">
          <p className="font-mono text-3xl leading-tight font-semibold break-all">{tag.serial}</p>
          <p className="font-mono">
            {tag.partNumber} {tag.revision}
          </p>
          <p className="leading-snug">
            {tag.operation} {tag.title}
          </p>
          {tag.findings === null ? null : (
            <p className="font-semibold">
              {t('tagFinding')} <span className="font-mono">{tag.findings}</span>
            </p>
          )}
        </div>
        <svg
          role="img"
          aria-label={t('tagCode', { serial: tag.serial })}
          viewBox={`-1 -1 ${String(side)} ${String(side)}`}
          className="size-[22mm] shrink-0"
          shapeRendering="crispEdges"
        >
          <path d={tag.code.path} fill="currentColor" />
        </svg>
      </div>
      <p className="border-t border-ink pt-[1mm] text-sm leading-tight">
        {tag.by}, <When at={tag.at} />
        <br />
        <span className="font-mono">
          {tag.inspection} · {tag.basket}
        </span>
      </p>
    </li>
  );
}

/** Fixed-size tags for the parts that leave a basket; the printer takes one to a label. */
export function HoldTagsPage({ id, number, tags }: { id: string; number: string; tags: readonly HoldTag[] }) {
  const t = useMessages('baskets');
  return (
    <div className="flex flex-col gap-4">
      <div data-print="hide">
        <PageHeader
          title={t('tagsTitle')}
          code={number}
          subtitle={t('tagsHint')}
          actions={
            <>
              <LinkButton size="capture" href={`/baskets/${id}`}>
                {t('back')}
              </LinkButton>
              {tags.length > 0 ? (
                <Button kind="primary" size="capture" onClick={() => window.print()}>
                  {t('print')}
                </Button>
              ) : null}
            </>
          }
        />
      </div>
      {tags.length === 0 ? (
        <EmptyState title={t('tagsEmpty')} />
      ) : (
        <ul className="flex flex-wrap gap-4 print:block">
          {tags.map((tag) => (
            <Tag key={tag.inspection} tag={tag} />
          ))}
        </ul>
      )}
    </div>
  );
}
