'use client';

import { useState } from 'react';
import { object, string } from 'yup';
import { DateField } from '@/components/forms/date-field';
import { DecimalField } from '@/components/forms/decimal-field';
import { decimalFrom } from '@/components/forms/decimal-text';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextField } from '@/components/forms/text-field';
import { useKeysetList } from '@/components/record/use-keyset-list';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { DataTable, type DataColumn } from '@/components/ui/data-table';
import { Dialog } from '@/components/ui/dialog';
import { EmptyState } from '@/components/ui/empty-state';
import { Panel } from '@/components/ui/panel';
import { Skeleton } from '@/components/ui/skeleton';
import type { MeasurementProcess } from '@/services/contracts/techniques';

const initialValues = { characteristic: '', gaugeKind: '', expanded: '', k: '2', unit: '', basis: '', validFrom: '' };

function ProcessForm({ technique, onRecorded }: { technique: string; onRecorded: () => void }) {
  const t = useMessages('techniques');
  const needed = string().trim().required(t('needed'));
  const form = useProblemForm({
    initialValues,
    validationSchema: object({
      ...{
        characteristic: needed,
        gaugeKind: needed,
        expanded: needed,
        k: needed,
        unit: needed,
        basis: needed,
        validFrom: needed,
      },
    }),
    onSubmit: async ({ expanded, k, ...rest }) => {
      const body = { technique, ...rest, expanded: decimalFrom(expanded) ?? expanded, k: decimalFrom(k) ?? k };
      await sendJson('/api/measurement-processes', { body });
      onRecorded();
    },
  });
  return (
    <ProblemForm form={form} label={t('recordProcess')}>
      <FormStatus />
      <div className="grid gap-3 md:grid-cols-2">
        <TextField name="characteristic" label={t('characteristic')} code maxLength={40} />
        <TextField name="gaugeKind" label={t('gaugeKind')} code maxLength={40} />
      </div>
      <div className="grid gap-3 md:grid-cols-3">
        <DecimalField name="expanded" label={t('expanded')} />
        <DecimalField name="k" label={t('k')} />
        <TextField name="unit" label={t('unit')} maxLength={20} />
      </div>
      <TextField name="basis" label={t('basis')} hint={t('basisHint')} maxLength={200} />
      <DateField name="validFrom" label={t('validFrom')} />
      <div>
        <SubmitButton>{t('recordAction')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}

function useColumns(): DataColumn<MeasurementProcess>[] {
  const t = useMessages('techniques');
  const mono = (text: string) => <span className="font-mono whitespace-nowrap">{text}</span>;
  return [
    { key: 'characteristic', title: t('characteristic'), names: true, cell: (row) => mono(row.characteristic) },
    { key: 'gauge', title: t('gaugeKind'), cell: (row) => mono(row.gaugeKind) },
    { key: 'expanded', title: t('expanded'), align: 'end', cell: (row) => mono(`${row.expanded} ${row.unit}`) },
    { key: 'k', title: t('k'), align: 'end', cell: (row) => mono(row.k) },
    { key: 'from', title: t('validFrom'), cell: (row) => mono(row.validFrom) },
    { key: 'basis', title: t('basis'), cell: (row) => row.basis },
  ];
}

/** Uncertainties of a technique, and recording one. */
export function MeasurementProcesses({ technique, mayRecord }: { technique: string; mayRecord: boolean }) {
  const t = useMessages('techniques');
  const [open, setOpen] = useState(false);
  const { rows, more, busy, renew } = useKeysetList<MeasurementProcess>(
    `/api/measurement-processes?limit=50&technique=${encodeURIComponent(technique)}`,
  );
  const columns = useColumns();
  return (
    <Panel
      title={t('processes')}
      subtitle={t('processesHint')}
      flush
      actions={mayRecord ? <Button onClick={() => setOpen(true)}>{t('recordProcess')}</Button> : undefined}
    >
      {rows ? (
        <DataTable
          caption={t('processes')}
          rows={rows}
          rowKey={({ id }) => id}
          columns={columns}
          empty={<EmptyState title={t('noProcess')}>{t('noProcessHint')}</EmptyState>}
        />
      ) : (
        <Skeleton lines={3} />
      )}
      {more ? (
        <div className="border-t border-line p-3">
          <Button busy={busy} onClick={more}>
            {t('more')}
          </Button>
        </div>
      ) : null}
      <Dialog open={open} onClose={() => setOpen(false)} title={t('recordProcess')}>
        <ProcessForm
          technique={technique}
          onRecorded={() => {
            setOpen(false);
            void renew();
          }}
        />
      </Dialog>
    </Panel>
  );
}
