'use client';

import { object, string } from 'yup';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { SelectField } from '@/components/forms/select-field';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextField } from '@/components/forms/text-field';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import type { Customer } from '@/services/contracts/orders';

/** Enters a customer's drawing; of a number that is known, a further revision. */
export function NewDrawingForm({ onDone }: { readonly onDone: () => void }) {
  const t = useMessages('plans');
  const customers = useAnswer<{ items: Customer[] }>('/api/customers');
  const needed = string().trim().required(t('needed'));
  const form = useProblemForm({
    initialValues: { customer: '', number: '', revision: '', title: '' },
    validationSchema: object({ customer: needed, number: needed, revision: needed, title: needed }),
    onSubmit: async (body) => {
      await sendJson('/api/drawings', { body });
      onDone();
    },
  });
  return (
    <ProblemForm form={form} label={t('newDrawing')}>
      <FormStatus />
      <SelectField
        name="customer"
        label={t('customer')}
        options={(customers.answer?.items ?? []).map(({ code, name }) => ({ value: code, label: name }))}
      />
      <TextField name="number" label={t('drawingNumber')} code maxLength={40} />
      <TextField name="revision" label={t('drawingRevision')} code maxLength={12} />
      <TextField name="title" label={t('title')} maxLength={200} />
      <div>
        <SubmitButton>{t('enterDrawing')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}
