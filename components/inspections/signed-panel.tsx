'use client';

import Link from 'next/link';
import { OpenInspection } from '@/components/parts/open-inspection';
import { useMessages } from '@/components/theme/use-messages';
import { Digest } from '@/components/ui/digest';
import { Notice } from '@/components/ui/notice';
import { Panel } from '@/components/ui/panel';
import { VerdictMark } from '@/components/ui/verdict-mark';
import { When } from '@/components/ui/when';
import type { InspectionAnswer } from '@/services/contracts/inspections';

const workable = ['open', 'in-work', 'to-be-repeated'];

/** What was signed, what it led to, and where the work goes on. */
export function SignedPanel({ answer, mayInspect }: { answer: InspectionAnswer; mayInspect: boolean }) {
  const t = useMessages('inspections');
  const { signed, part } = answer;
  if (!signed) return null;
  const here = part.ring.findIndex(({ key }) => key === answer.requirement.key);
  // The next one on the route; when there is none, what was left out before.
  const next = [...part.ring.slice(here + 1), ...part.ring.slice(0, Math.max(0, here))].find(({ state }) =>
    workable.includes(state),
  );
  const link = 'text-accent underline underline-offset-4';
  return (
    <Panel title={t('signedAs', { number: signed.number })} actions={<VerdictMark verdict={signed.verdict} />}>
      <div role="status" className="flex flex-col gap-2">
        <p>{signed.sentence}</p>
        <p className="text-ink-soft">
          {t('signedBy', { name: signed.by.name })} <When at={signed.at} to="second" />
          {signed.lateEntry ? ` · ${t('lateEntry')}` : ''}
        </p>
        <p className="text-sm text-ink-soft">
          {t('recordDigest')} <Digest value={signed.recordDigest} />
        </p>
        {signed.ended ? (
          <Notice kind="unsure" title={t(`ended.${signed.ended.kind}`)}>
            {signed.ended.reason} <When at={signed.ended.at} />
          </Notice>
        ) : null}
        <p className="flex flex-wrap items-center gap-4">
          {signed.findings.map(({ number }) => (
            <Link key={number} href={`/findings/${number}`} className={link}>
              {t('finding', { number })}
            </Link>
          ))}
          <Link href={`/parts/${part.id}`} className={link}>
            {t('toPart', { serial: part.serial })}
          </Link>
        </p>
        {next && mayInspect ? (
          <p>
            <OpenInspection
              part={part.id}
              requirement={next.key}
              label={t('goOnWith', { operation: next.operation, title: next.title })}
            />
          </p>
        ) : null}
      </div>
    </Panel>
  );
}
