'use client';

import { useUrlFilters } from '@/components/grids/use-url-filters';
import { useKeysetList } from '@/components/record/use-keyset-list';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { DataTable } from '@/components/ui/data-table';
import { EmptyState } from '@/components/ui/empty-state';
import { ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { Skeleton } from '@/components/ui/skeleton';
import { When } from '@/components/ui/when';
import type { Customer, Order } from '@/services/contracts/orders';
import type { Drawing } from '@/services/contracts/plans';
import { NewOrderForm } from './new-order-form';

function OrderPanel({ order }: { order: Order }) {
  const t = useMessages('orders');
  return (
    <Panel
      title={
        <>
          <span className="font-mono">{order.number}</span> {order.customer}
        </>
      }
      subtitle={
        <>
          {t('purchaseOrder')} <span className="font-mono">{order.purchaseOrder}</span>, {t('entered')}{' '}
          <When at={order.createdAt} to="day" />
        </>
      }
      flush
    >
      <DataTable
        caption={order.number}
        rows={order.lines}
        rowKey={(row) => row.id}
        columns={[
          { key: 'line', title: t('line'), align: 'end', cell: (row) => row.line },
          { key: 'part', title: t('part'), names: true, cell: (row) => `${row.partNumber} ${row.revision}` },
          { key: 'quantity', title: t('quantity'), align: 'end', cell: (row) => row.quantity },
          { key: 'released', title: t('released'), align: 'end', cell: (row) => row.released },
          { key: 'due', title: t('due'), cell: (row) => <When at={row.dueOn} to="day" /> },
        ]}
      />
    </Panel>
  );
}

/** Orders with their lines, and entering one. */
export function OrdersPage({ mayKeep }: { mayKeep: boolean }) {
  const t = useMessages('orders');
  const { filters, set } = useUrlFilters(['customer'] as const);
  const chosen = filters.customer === '' ? '' : `&customer=${encodeURIComponent(filters.customer)}`;
  const { rows, problem, more, busy, renew } = useKeysetList<Order>(`/api/orders?limit=25${chosen}`);
  const customers = useAnswer<{ items: Customer[] }>('/api/customers?limit=200').answer?.items ?? [];
  const drawings = useAnswer<{ items: Drawing[] }>(mayKeep ? '/api/drawings?limit=200' : null).answer?.items;
  return (
    <div className="flex flex-col gap-4">
      <PageHeader title={t('title')} subtitle={t('subtitle')} />
      <label className="flex max-w-80 flex-col gap-1">
        <span className="font-semibold">{t('customer')}</span>
        <select className="field" value={filters.customer} onChange={(event) => set({ customer: event.target.value })}>
          <option value="">{t('allCustomers')}</option>
          {customers.map(({ code, name }) => (
            <option key={code} value={code}>
              {name}
            </option>
          ))}
        </select>
      </label>
      {problem ? <ProblemNotice problem={problem} /> : rows ? null : <Skeleton lines={6} />}
      {rows?.length === 0 ? <EmptyState title={t('empty')}>{t('emptyHint')}</EmptyState> : null}
      {(rows ?? []).map((order) => (
        <OrderPanel key={order.id} order={order} />
      ))}
      {more ? (
        <div>
          <Button busy={busy} onClick={more}>
            {t('more')}
          </Button>
        </div>
      ) : null}
      {mayKeep && drawings ? (
        <Panel title={t('newOrder')}>
          <NewOrderForm customers={customers} drawings={drawings} onDone={() => void renew()} />
        </Panel>
      ) : null}
    </div>
  );
}
