'use client';

import { useState } from 'react';
import { object, string } from 'yup';
import { DateField } from '@/components/forms/date-field';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { SelectField } from '@/components/forms/select-field';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextField } from '@/components/forms/text-field';
import { useMessages } from '@/components/theme/use-messages';
import { Notice } from '@/components/ui/notice';
import { method } from '@/services/contracts/common';
import { level } from '@/services/contracts/personnel';
import { useMethodWords } from './method-words';

export interface PersonChoice {
  readonly id: string;
  readonly name: string;
}

const initialValues = { person: '', method: '', technique: '', level: '2', products: '', validFrom: '', validTo: '' };

/** Prepares an authorisation, for a level 3 to grant. */
export function PrepareForm({ people, onDone }: { people: readonly PersonChoice[]; onDone: () => void }) {
  const t = useMessages('personnel');
  const methodWords = useMethodWords();
  const [done, setDone] = useState(false);
  const needed = string().trim().required(t('needed'));
  const form = useProblemForm({
    initialValues,
    validationSchema: object({ person: needed, method: needed, level: needed, validFrom: needed, validTo: needed }),
    onSubmit: async ({ technique, products, ...rest }, { resetForm }) => {
      setDone(false);
      const body = { ...rest, ...(technique === '' ? {} : { technique }), ...(products === '' ? {} : { products }) };
      await sendJson('/api/authorisations', { body });
      resetForm();
      setDone(true);
      onDone();
    },
  });
  return (
    <ProblemForm form={form} label={t('prepare')}>
      {done ? <Notice kind="done" title={t('preparedDone')} /> : null}
      <FormStatus />
      <SelectField name="person" label={t('person')} options={people.map(({ id, name }) => ({ value: id, label: name }))} />
      <SelectField
        name="method"
        label={t('method')}
        options={method.options.map((value) => ({ value, label: methodWords(value) }))}
      />
      <SelectField
        name="level"
        label={t('level')}
        emptyLabel={null}
        options={level.options.map((value) => ({ value, label: t(`levels.${value}`) }))}
      />
      <TextField name="technique" label={t('technique')} hint={t('techniqueHint')} optional code />
      <TextField name="products" label={t('products')} optional />
      <div className="grid grid-cols-2 gap-3">
        <DateField name="validFrom" label={t('validFrom')} />
        <DateField name="validTo" label={t('validTo')} />
      </div>
      <div>
        <SubmitButton>{t('prepareAction')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}
