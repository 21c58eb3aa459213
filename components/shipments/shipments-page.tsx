'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { SelectField } from '@/components/forms/select-field';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextAreaField } from '@/components/forms/text-field';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { DataTable } from '@/components/ui/data-table';
import { EmptyState } from '@/components/ui/empty-state';
import { ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { Skeleton } from '@/components/ui/skeleton';
import { StateWord } from '@/components/ui/state-word';
import type { Order } from '@/services/contracts/orders';
import type { ShipmentSummary } from '@/services/contracts/shipments';

function GatherForm({ orders }: { orders: readonly Order[] }) {
  const t = useMessages('shipments');
  const router = useRouter();
  const lines = orders.flatMap((order) =>
    order.lines.map((line) => ({
      value: line.id,
      label: t('lineWords', {
        purchaseOrder: order.purchaseOrder,
        line: line.line,
        partNumber: line.partNumber,
        revision: line.revision,
        left: line.quantity - line.released,
        customer: order.customer,
      }),
    })),
  );
  const form = useProblemForm({
    initialValues: { orderLine: lines[0]?.value ?? '', serials: '' },
    onSubmit: async ({ orderLine, serials }) => {
      const list = serials.split(/[\s,;]+/).filter((one) => one !== '');
      const made = await sendJson<{ number: string }>('/api/shipments', { body: { orderLine, serials: list } });
      router.push(`/shipments/${made.number}`);
    },
  });
  return (
    <ProblemForm form={form} label={t('gather')}>
      <FormStatus />
      <SelectField name="orderLine" label={t('orderLine')} options={lines} />
      <TextAreaField name="serials" label={t('serialList')} />
      <SubmitButton>{t('create')}</SubmitButton>
    </ProblemForm>
  );
}

/** Shipments, and gathering a new one. */
export function ShipmentsPage({ mayGather }: { mayGather: boolean }) {
  const t = useMessages('shipments');
  const { answer, problem } = useAnswer<{ items: ShipmentSummary[] }>('/api/shipments?limit=200');
  const orders = useAnswer<{ items: Order[] }>('/api/orders');
  if (problem) return <ProblemNotice problem={problem} />;
  if (!answer) return <Skeleton lines={6} />;
  return (
    <div className="flex flex-col gap-4">
      <PageHeader title={t('title')} subtitle={t('subtitle')} />
      <DataTable
        caption={t('title')}
        rows={answer.items}
        rowKey={(row) => row.number}
        empty={<EmptyState title={t('empty')} />}
        columns={[
          {
            key: 'number',
            title: t('number'),
            names: true,
            cell: (row) => (
              <Link href={`/shipments/${row.number}`} className="font-mono text-accent underline underline-offset-4">
                {row.number}
              </Link>
            ),
          },
          { key: 'customer', title: t('customer'), cell: (row) => row.customer.name },
          { key: 'order', title: t('order'), cell: (row) => `${row.order.purchaseOrder} / ${String(row.order.line)}` },
          { key: 'part', title: t('part'), cell: (row) => `${row.order.partNumber} ${row.order.revision}` },
          { key: 'serials', title: t('serials'), align: 'end', cell: (row) => row.partCount },
          { key: 'state', title: t('state'), cell: (row) => <StateWord state={row.state} /> },
          { key: 'certificate', title: t('certificate'), cell: (row) => row.certificate?.number ?? '–' },
        ]}
      />
      {mayGather && orders.answer ? (
        <Panel title={t('gather')}>
          <GatherForm orders={orders.answer.items} />
        </Panel>
      ) : null}
    </div>
  );
}
