'use client';

import Link from 'next/link';
import { useMessages } from '@/components/theme/use-messages';
import { StateWord } from '@/components/ui/state-word';
import { When } from '@/components/ui/when';
import type { Trace } from '@/services/contracts/trace';

const link = 'font-mono text-accent underline underline-offset-4';

/** Findings with every decision on them. */
export function TracedFindings({ rows }: { rows: Trace['findings'] }) {
  const t = useMessages('trace');
  if (rows.length === 0) return <p>{t('nothing')}</p>;
  return (
    <ol className="flex flex-col gap-3">
      {rows.map((one) => (
        <li key={one.number}>
          <p className="flex flex-wrap items-baseline gap-x-3">
            <When at={one.openedAt} />
            <Link href={`/findings/${one.number}`} className={link}>
              {one.number}
            </Link>
            <StateWord state={one.state} />
            <span>{t('opened', { by: one.openedBy })}</span>
          </p>
          <p>{one.summary}</p>
          <ul className="ml-2 border-l border-line-strong pl-4">
            {one.dispositions.map((decision) => (
              <li key={decision.decidedAt}>
                <When at={decision.decidedAt} /> {t('decided', { by: decision.decidedBy })}: {decision.sentence} {decision.reason}
              </li>
            ))}
            {one.closedAt === null ? null : (
              <li>
                <When at={one.closedAt} /> {t('closed')}
              </li>
            )}
          </ul>
        </li>
      ))}
    </ol>
  );
}

/** Holds on the part or its lots, lifted ones too. */
export function TracedHolds({ rows }: { rows: Trace['holds'] }) {
  const t = useMessages('trace');
  if (rows.length === 0) return <p>{t('nothing')}</p>;
  return (
    <ol className="flex flex-col gap-2">
      {rows.map((one) => (
        <li key={one.number}>
          <When at={one.placedAt} /> <span className="font-mono">{one.number}</span> {one.target},{' '}
          {t('placed', { by: one.placedBy })}: {one.reason}
          {one.liftedAt === null ? null : (
            <p className="ml-2 border-l border-line-strong pl-4">
              <When at={one.liftedAt} /> {t('lifted', { by: one.liftedBy ?? '', reason: one.liftedReason ?? '' })}
            </p>
          )}
        </li>
      ))}
    </ol>
  );
}

/** The release with its sentence, its certificate, and what became of it. */
export function TracedCertificates({ rows }: { rows: Trace['certificates'] }) {
  const t = useMessages('trace');
  if (rows.length === 0) return <p>{t('nothing')}</p>;
  return (
    <ol className="flex flex-col gap-3">
      {rows.map((one) => (
        <li key={one.number}>
          <p className="flex flex-wrap items-baseline gap-x-3">
            <When at={one.signedAt} />
            <Link href={`/certificates/${one.number}`} className={link}>
              {one.number}
            </Link>
            <StateWord state={one.state} />
            <span>{t('signedBy', { by: one.signedBy })}</span>
            <Link href={`/shipments/${one.shipment}`} className="text-accent underline underline-offset-4">
              {t('shipment', { number: one.shipment })}
            </Link>
          </p>
          <p className="max-w-prose">{one.sentence}</p>
          <ul className="ml-2 border-l border-line-strong pl-4">
            {one.issuedAt === null ? null : (
              <li>
                <When at={one.issuedAt} /> {t('issued')}
              </li>
            )}
            {one.receipts.map((receipt) => (
              <li key={`${receipt.kind} ${receipt.at}`}>
                <When at={receipt.at} /> {t('receipt', { kind: receipt.kind, by: receipt.by })} {receipt.note}
              </li>
            ))}
            {one.withdrawals.map((gone) => (
              <li key={gone.withdrawnAt} className="font-semibold text-reject">
                <When at={gone.withdrawnAt} />{' '}
                {t('withdrawn', { whole: gone.whole ? 'yes' : 'no', by: gone.withdrawnBy, reason: gone.reason })}
              </li>
            ))}
          </ul>
        </li>
      ))}
    </ol>
  );
}
