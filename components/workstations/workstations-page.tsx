'use client';

import { useState } from 'react';
import { object, string } from 'yup';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { SelectField } from '@/components/forms/select-field';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextField } from '@/components/forms/text-field';
import { badgeStart } from '@/components/scanner/badge-text';
import { usePageScanner, useScans } from '@/components/scanner/page-scanner';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { DataTable } from '@/components/ui/data-table';
import { EmptyState } from '@/components/ui/empty-state';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { Skeleton } from '@/components/ui/skeleton';
import { When } from '@/components/ui/when';
import { scanPrefix, usualPrefix, type Workstation } from '@/services/contracts/workstations';

function RegisterForm({ onDone }: { onDone: () => void }) {
  const t = useMessages('workstations');
  const { here, renewHere } = usePageScanner();
  const form = useProblemForm({
    initialValues: { name: '', place: '', scanPrefix: usualPrefix as string },
    validationSchema: object({ name: string().trim().required(t('nameNeeded')) }),
    onSubmit: async ({ name, place, scanPrefix: prefix }) => {
      await sendJson('/api/workstations', { body: { name, scanPrefix: prefix, ...(place.trim() === '' ? {} : { place }) } });
      await renewHere();
      onDone();
    },
  });
  return (
    <Panel title={t('register')}>
      {here?.workstation ? <Notice title={t('registeredHere', { name: here.workstation.name })} /> : null}
      <ProblemForm form={form} label={t('register')} className="mt-3 grid items-start gap-4 sm:grid-cols-3">
        <TextField name="name" label={t('name')} maxLength={60} />
        <TextField name="place" label={t('place')} maxLength={80} />
        <SelectField
          name="scanPrefix"
          label={t('prefix')}
          hint={t('prefixHint')}
          options={scanPrefix.options.map((value) => ({ value, label: value }))}
        />
        <div className="sm:col-span-3">
          <FormStatus />
          <SubmitButton>{t('registerNow')}</SubmitButton>
        </div>
      </ProblemForm>
    </Panel>
  );
}

interface PeoplePage {
  readonly items: readonly { readonly id: string; readonly name: string; readonly disabledAt: string | null }[];
}

function BadgeForm() {
  const t = useMessages('workstations');
  const { answer: people } = useAnswer<PeoplePage>('/api/people?limit=200');
  const [given, setGiven] = useState<string>();
  const form = useProblemForm({
    initialValues: { person: '', badge: '' },
    validationSchema: object({ person: string().required(t('nameNeeded')), badge: string().trim().required(t('nameNeeded')) }),
    onSubmit: async ({ person, badge }, { resetForm }) => {
      await sendJson(`/api/people/${person}/badge`, { method: 'PUT', body: { badge } });
      setGiven(people?.items.find(({ id }) => id === person)?.name);
      resetForm();
    },
  });
  useScans({ onScan: () => undefined, onBadge: (text) => void form.formik.setFieldValue('badge', text) });
  const options = (people?.items ?? []).filter(({ disabledAt }) => disabledAt === null);
  return (
    <Panel title={t('badges')} subtitle={t('badgesHint', { start: badgeStart })}>
      {given === undefined ? null : <Notice kind="done" title={t('given', { name: given })} />}
      <ProblemForm form={form} label={t('badges')} className="mt-3 grid items-start gap-4 sm:grid-cols-2">
        <SelectField
          name="person"
          label={t('person')}
          options={[{ value: '', label: t('choose') }, ...options.map(({ id, name }) => ({ value: id, label: name }))]}
        />
        <TextField name="badge" label={t('badge')} maxLength={80} />
        <div className="sm:col-span-2">
          <FormStatus />
          <SubmitButton>{t('give')}</SubmitButton>
        </div>
      </ProblemForm>
    </Panel>
  );
}

/** Where badge and PIN count: this browser is registered here, and people get their badges. */
export function WorkstationsPage() {
  const t = useMessages('workstations');
  const { answer, problem, renew } = useAnswer<{ items: readonly Workstation[] }>('/api/workstations', 30_000);
  const retire = async (id: string) => {
    await sendJson(`/api/workstations/${id}/retirement`, { body: {} });
    await renew();
  };
  return (
    <div className="flex flex-col gap-4">
      <PageHeader title={t('title')} subtitle={t('subtitle')} />
      <RegisterForm onDone={() => void renew()} />
      <BadgeForm />
      {problem ? <ProblemNotice problem={problem} /> : null}
      {answer ? (
        <DataTable
          caption={t('title')}
          rows={answer.items}
          rowKey={({ id }) => id}
          empty={<EmptyState title={t('empty')}>{t('emptyHint')}</EmptyState>}
          columns={[
            { key: 'name', title: t('name'), names: true, cell: ({ name }) => <strong>{name}</strong> },
            { key: 'place', title: t('place'), cell: ({ place }) => place ?? '–' },
            { key: 'prefix', title: t('prefix'), cell: (row) => <span className="font-mono">{row.scanPrefix}</span> },
            { key: 'sitting', title: t('sitting'), cell: ({ sitting }) => sitting?.name ?? t('nobody') },
            { key: 'registered', title: t('registered'), cell: ({ registeredAt }) => <When at={registeredAt} to="day" /> },
            {
              key: 'retire',
              title: '',
              cell: ({ id, name, retiredAt }) =>
                retiredAt === null ? <Button onClick={() => void retire(id)}>{t('retire', { name })}</Button> : t('retired'),
            },
          ]}
        />
      ) : (
        <Skeleton lines={4} />
      )}
    </div>
  );
}
