'use client';

import { useState } from 'react';
import { object, string } from 'yup';
import { CheckField } from '@/components/forms/check-field';
import { DateField } from '@/components/forms/date-field';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { SelectField } from '@/components/forms/select-field';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { useMessages } from '@/components/theme/use-messages';
import { Notice } from '@/components/ui/notice';
import type { PersonChoice } from './prepare-form';

const tests = ['near-vision', 'colour-perception'] as const;
const results = ['pass', 'fail'] as const;

/** Records a vision test; it stays as recorded. */
export function VisionForm({ people, onDone }: { people: readonly PersonChoice[]; onDone: () => void }) {
  const t = useMessages('personnel');
  const [done, setDone] = useState(false);
  const needed = string().trim().required(t('needed'));
  const form = useProblemForm({
    initialValues: { person: '', test: 'near-vision', result: '', corrected: false, testedOn: '' },
    validationSchema: object({ person: needed, test: needed, result: needed, testedOn: needed }),
    onSubmit: async (body, { resetForm }) => {
      setDone(false);
      await sendJson('/api/vision-tests', { body });
      resetForm();
      setDone(true);
      onDone();
    },
  });
  return (
    <ProblemForm form={form} label={t('record')}>
      {done ? <Notice kind="done" title={t('recorded')} /> : null}
      <FormStatus />
      <SelectField name="person" label={t('person')} options={people.map(({ id, name }) => ({ value: id, label: name }))} />
      <SelectField
        name="test"
        label={t('test')}
        emptyLabel={null}
        options={tests.map((value) => ({ value, label: t(`tests.${value}`) }))}
      />
      <SelectField
        name="result"
        label={t('result')}
        options={results.map((value) => ({ value, label: t(`results.${value}`) }))}
      />
      <CheckField name="corrected" label={t('corrected')} hint={t('correctedHint')} />
      <DateField name="testedOn" label={t('testedOn')} />
      <div>
        <SubmitButton>{t('recordAction')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}
