'use client';

import Link from 'next/link';
import { sendJson } from '@/components/forms/send-json';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { Ring } from '@/components/ui/ring';
import { Skeleton } from '@/components/ui/skeleton';
import type { GateReason, Shipment } from '@/services/contracts/shipments';
import { ReleaseDialog } from './release-dialog';

function Reasons({ reasons }: { reasons: readonly GateReason[] }) {
  const t = useMessages('shipments');
  return (
    <ul className="list-disc ps-5 text-reject">
      {reasons.map(({ gate, code, message, who }) => (
        <li key={`${String(gate)}${code}${message}`}>
          {t('gate', { gate })}: {t('acts', { message, who })}
        </li>
      ))}
    </ul>
  );
}

/** A shipment with the gates of every serial, and the release. */
export function ShipmentPage({ number, mayGather, maySign }: { number: string; mayGather: boolean; maySign: boolean }) {
  const t = useMessages('shipments');
  const { answer: shipment, problem, renew } = useAnswer<Shipment>(`/api/shipments/${number}`);
  if (problem) return <ProblemNotice problem={problem} />;
  if (!shipment) return <Skeleton lines={8} />;
  const against = shipment.reasons.length + shipment.parts.reduce((sum, { reasons }) => sum + reasons.length, 0);
  const takeOff = async (serial: string) =>
    renew(await sendJson<Shipment>(`/api/shipments/${number}/parts`, { body: { remove: [serial] } }));
  return (
    <div className="flex flex-col gap-4">
      <PageHeader
        title={shipment.number}
        subtitle={`${shipment.customer.name} · ${shipment.order.purchaseOrder} / ${String(shipment.order.line)} · ${shipment.order.partNumber} ${shipment.order.revision}`}
        actions={maySign && !shipment.certificate ? <ReleaseDialog shipment={shipment} onSigned={() => void renew()} /> : null}
      />
      {shipment.certificate ? (
        <Notice kind="done" title={t('signed', { number: shipment.certificate.number })}>
          <Link href={`/certificates/${shipment.certificate.number}`} className="text-accent underline underline-offset-4">
            {shipment.certificate.number}
          </Link>
        </Notice>
      ) : (
        <Notice
          kind={shipment.releasable ? 'done' : 'unsure'}
          title={shipment.releasable ? t('open') : t('closed', { count: against })}
        >
          <Reasons reasons={shipment.reasons} />
        </Notice>
      )}
      <Panel title={t('gates')}>
        <ul className="flex flex-col gap-3">
          {shipment.parts.map(({ part, heat, reasons }) => (
            <li key={part.id} className="flex flex-wrap items-start gap-x-4 gap-y-1 border-b border-line pb-3">
              <Ring segments={part.ring} held={part.held} pixels={28} />
              <Link href={`/parts/${part.id}`} className="font-mono text-lg text-accent underline underline-offset-4">
                {part.serial}
              </Link>
              <span className="text-ink-soft">{t('heat', { heat: heat ?? '–' })}</span>
              <div className="flex-1">
                {shipment.certificate ? <span className="text-ink-soft">{t('noGates')}</span> : <Reasons reasons={reasons} />}
              </div>
              {mayGather && !shipment.certificate ? (
                <Button onClick={() => void takeOff(part.serial)}>{t('takeOff', { serial: part.serial })}</Button>
              ) : null}
            </li>
          ))}
        </ul>
      </Panel>
    </div>
  );
}
