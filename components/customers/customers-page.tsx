'use client';

import { useState } from 'react';
import { object, string } from 'yup';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { SelectField } from '@/components/forms/select-field';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextAreaField, TextField } from '@/components/forms/text-field';
import { useKeysetList } from '@/components/record/use-keyset-list';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { DataTable } from '@/components/ui/data-table';
import { EmptyState } from '@/components/ui/empty-state';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { Skeleton } from '@/components/ui/skeleton';
import type { Customer } from '@/services/contracts/orders';

const initialValues = { code: '', name: '', address: '', qualityEmail: '', locale: 'en' };

function NewCustomer({ onDone }: { onDone: () => void }) {
  const t = useMessages('customers');
  const [done, setDone] = useState('');
  const needed = string().trim().required(t('needed'));
  const form = useProblemForm({
    initialValues,
    validationSchema: object({ code: needed, name: needed, address: needed, qualityEmail: needed }),
    onSubmit: async (body, { resetForm }) => {
      setDone('');
      const { name } = await sendJson<Customer>('/api/customers', { body });
      resetForm();
      setDone(name);
      onDone();
    },
  });
  return (
    <ProblemForm form={form} label={t('newCustomer')}>
      {done === '' ? null : <Notice kind="done" title={t('done', { name: done })} />}
      <FormStatus />
      <div className="grid gap-4 md:grid-cols-2">
        <TextField name="code" label={t('code')} hint={t('codeHint')} code maxLength={20} />
        <TextField name="name" label={t('name')} maxLength={120} />
        <TextField name="qualityEmail" label={t('email')} hint={t('emailHint')} type="email" maxLength={200} />
        <SelectField
          name="locale"
          label={t('language')}
          emptyLabel={null}
          options={(['en', 'fr'] as const).map((value) => ({ value, label: t(`languages.${value}`) }))}
        />
      </div>
      <TextAreaField name="address" label={t('address')} maxLength={400} />
      <div>
        <SubmitButton>{t('enter')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}

/** Customers, and entering one. */
export function CustomersPage({ mayKeep }: { mayKeep: boolean }) {
  const t = useMessages('customers');
  const { rows, problem, more, busy, renew } = useKeysetList<Customer>('/api/customers?limit=50');
  if (problem) return <ProblemNotice problem={problem} />;
  if (!rows) return <Skeleton lines={6} />;
  return (
    <div className="flex flex-col gap-4">
      <PageHeader title={t('title')} subtitle={t('subtitle')} />
      <DataTable
        caption={t('title')}
        rows={rows}
        rowKey={(row) => row.id}
        empty={<EmptyState title={t('empty')} />}
        columns={[
          { key: 'name', title: t('name'), names: true, cell: (row) => row.name },
          { key: 'code', title: t('code'), cell: (row) => <span className="font-mono">{row.code}</span> },
          { key: 'email', title: t('email'), cell: (row) => row.qualityEmail },
          { key: 'address', title: t('address'), cell: (row) => row.address },
          { key: 'language', title: t('language'), cell: (row) => t(`languages.${row.locale}`) },
          { key: 'drawings', title: t('drawings'), align: 'end', cell: (row) => row.drawings },
          { key: 'orders', title: t('orders'), align: 'end', cell: (row) => row.orders },
        ]}
      />
      {more ? (
        <div>
          <Button busy={busy} onClick={more}>
            {t('more')}
          </Button>
        </div>
      ) : null}
      {mayKeep ? (
        <Panel title={t('newCustomer')}>
          <NewCustomer onDone={() => void renew()} />
        </Panel>
      ) : null}
    </div>
  );
}
