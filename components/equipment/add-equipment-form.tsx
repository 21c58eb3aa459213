'use client';

import { useRouter } from 'next/navigation';
import { object, string } from 'yup';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { SelectField } from '@/components/forms/select-field';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextField } from '@/components/forms/text-field';
import { useMethodWords } from '@/components/personnel/method-words';
import { useMessages } from '@/components/theme/use-messages';
import { method } from '@/services/contracts/common';
import type { Equipment } from '@/services/contracts/equipment';

const initialValues = { number: '', title: '', kind: '', method: '', location: '' };

/** Enters a piece of equipment, and leads to it, where its calibration is recorded. */
export function AddEquipmentForm({ onAdded }: { onAdded: () => void }) {
  const t = useMessages('equipment');
  const methodWords = useMethodWords();
  const router = useRouter();
  const needed = string().trim().required(t('needed'));
  const form = useProblemForm({
    initialValues,
    validationSchema: object({ number: needed, title: needed, kind: needed, method: needed }),
    onSubmit: async ({ location, ...rest }) => {
      const made = await sendJson<Equipment>('/api/equipment', {
        body: { ...rest, ...(location.trim() === '' ? {} : { location }) },
      });
      onAdded();
      router.push(`/equipment/${made.id}`);
    },
  });
  return (
    <ProblemForm form={form} label={t('add')}>
      <FormStatus />
      <div className="grid gap-4 md:grid-cols-2">
        <TextField name="number" label={t('number')} code maxLength={40} />
        <SelectField
          name="method"
          label={t('method')}
          options={method.options.map((value) => ({ value, label: methodWords(value) }))}
        />
      </div>
      <TextField name="title" label={t('name')} maxLength={160} />
      <TextField name="kind" label={t('kind')} hint={t('kindHint')} code maxLength={40} />
      <TextField name="location" label={t('location')} optional maxLength={80} />
      <div>
        <SubmitButton>{t('addAction')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}
