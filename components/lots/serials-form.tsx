'use client';

import { useState } from 'react';
import { object, string } from 'yup';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { SelectField } from '@/components/forms/select-field';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextAreaField } from '@/components/forms/text-field';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Notice } from '@/components/ui/notice';
import type { PartSummary } from '@/services/contracts/parts';
import type { Drawing } from '@/services/contracts/plans';

/** Gives serials to positions of a cluster under an approved plan issue. */
export function SerialsForm({ cluster, onGiven }: { cluster: string; onGiven: () => void }) {
  const t = useMessages('lots');
  const [given, setGiven] = useState(0);
  const drawings = useAnswer<{ items: Drawing[] }>('/api/drawings?limit=200').answer?.items ?? [];
  const plans = drawings.flatMap(({ number, revisions }) =>
    revisions.flatMap(({ revision, plans: issues }) =>
      issues
        .filter(({ state }) => state === 'approved')
        .map(({ id, issue }) => ({ value: id, label: t('planChoice', { drawing: number, revision, issue }) })),
    ),
  );
  const needed = string().trim().required(t('needed'));
  const form = useProblemForm({
    initialValues: { plan: '', lines: '' },
    validationSchema: object({ plan: needed, lines: needed }),
    onSubmit: async ({ plan, lines }, { resetForm }) => {
      setGiven(0);
      const parts = lines
        .split('\n')
        .filter((line) => line.trim() !== '')
        .map((line) => {
          const [serial = '', position = ''] = line.trim().split(/[\s,;]+/);
          return { serial, position, cluster };
        });
      const made = await sendJson<{ items: PartSummary[] }>('/api/parts', { body: { plan, parts } });
      resetForm();
      setGiven(made.items.length);
      onGiven();
    },
  });
  return (
    <ProblemForm form={form} label={t('serials')}>
      {given > 0 ? <Notice kind="done" title={t('serialsDone', { count: given })} /> : null}
      <FormStatus
        labelOf={(path) => {
          const place = /^parts\.(\d+)\./.exec(path)?.[1];
          return place === undefined ? path : t('line', { line: Number(place) + 1 });
        }}
      />
      <SelectField name="plan" label={t('plan')} options={plans} />
      <TextAreaField name="lines" label={t('serialLines')} hint={t('serialHint')} rows={5} />
      <div>
        <SubmitButton>{t('serials')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}
