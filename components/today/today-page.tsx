'use client';

import Link from 'next/link';
import type { ReactNode } from 'react';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import type { CertificateSummary } from '@/services/contracts/certificates';
import type { Role } from '@/services/contracts/common';
import type { FindingSummary } from '@/services/contracts/findings';
import type { PartSummary } from '@/services/contracts/parts';
import type { ShipmentSummary } from '@/services/contracts/shipments';

const link = 'text-accent underline underline-offset-4';

function Waiting({ title, children }: { title: string; children: ReactNode }) {
  return (
    <Panel title={title}>
      <ul className="flex flex-col gap-2">{children}</ul>
    </Panel>
  );
}

function Findings() {
  const t = useMessages('today');
  const { answer } = useAnswer<{ items: FindingSummary[] }>('/api/findings?limit=50');
  return (
    <Waiting title={t('findings', { count: answer?.items.length ?? 0 })}>
      {(answer?.items ?? []).slice(0, 8).map((one) => (
        <li key={one.number}>
          <Link href={`/findings/${one.number}`} className={link}>
            {one.number}
          </Link>{' '}
          <span className="font-mono">{one.part.serial}</span> {one.summary}
        </li>
      ))}
    </Waiting>
  );
}

function Shipments() {
  const t = useMessages('today');
  const { answer } = useAnswer<{ items: ShipmentSummary[] }>('/api/shipments?limit=50');
  const open = (answer?.items ?? []).filter(({ certificate }) => certificate === null);
  return (
    <Waiting title={t('shipments', { count: open.length })}>
      {open.map((one) => (
        <li key={one.number}>
          <Link href={`/shipments/${one.number}`} className={link}>
            {one.number}
          </Link>{' '}
          {one.customer.name}, {one.order.partNumber} × {one.partCount}
        </li>
      ))}
    </Waiting>
  );
}

function Certificates() {
  const t = useMessages('today');
  const { answer } = useAnswer<{ items: CertificateSummary[] }>('/api/certificates?limit=50');
  const open = (answer?.items ?? []).filter(({ acknowledged, state }) => !acknowledged && state !== 'signed');
  return (
    <Waiting title={t('certificates', { count: open.length })}>
      {open.map((one) => (
        <li key={one.number}>
          <Link href={`/certificates/${one.number}`} className={link}>
            {one.number}
          </Link>{' '}
          {one.partNumber} × {one.quantity}
        </li>
      ))}
    </Waiting>
  );
}

function Parts() {
  const t = useMessages('today');
  const { answer } = useAnswer<{ items: PartSummary[] }>('/api/parts?state=in-process&limit=200');
  const rows = answer?.items ?? [];
  return (
    <Waiting title={t('parts', { count: rows.length })}>
      {rows.slice(0, 10).map((one) => (
        <li key={one.id}>
          <Link href={`/parts/${one.id}`} className={`${link} font-mono`}>
            {one.serial}
          </Link>{' '}
          {one.met}/{one.required}, {one.next}
        </li>
      ))}
    </Waiting>
  );
}

/** What waits for this person, by role. */
export function TodayPage({ name, role }: { name: string; role: Role }) {
  const t = useMessages('today');
  return (
    <div className="flex flex-col gap-4">
      <PageHeader title={t('title')} subtitle={t('greeting', { name })} />
      <div className="grid gap-4 lg:grid-cols-2">
        {role === 'inspector' ? <Parts /> : null}
        {role === 'reviewer' || role === 'auditor' ? <Findings /> : null}
        {role === 'reviewer' || role === 'administrator' ? <Shipments /> : null}
        {role === 'customer-quality' ? <Certificates /> : null}
        {role === 'auditor' ? (
          <Link href="/trace" className={link}>
            {t('trace')}
          </Link>
        ) : null}
      </div>
    </div>
  );
}
