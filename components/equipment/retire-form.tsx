'use client';

import { object, string } from 'yup';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextAreaField } from '@/components/forms/text-field';
import { useMessages } from '@/components/theme/use-messages';
import type { Equipment } from '@/services/contracts/equipment';

/** Takes equipment out of use for good. */
export function RetireForm({ equipment, onRetired }: { equipment: Equipment; onRetired: (answer: Equipment) => void }) {
  const t = useMessages('equipment');
  const form = useProblemForm({
    initialValues: { reason: '' },
    validationSchema: object({ reason: string().trim().min(5, t('reasonShort')).required(t('reasonShort')) }),
    onSubmit: async (body) => onRetired(await sendJson<Equipment>(`/api/equipment/${equipment.id}/retirement`, { body })),
  });
  return (
    <ProblemForm form={form} label={t('retireTitle', { number: equipment.number })}>
      <p>{t('retireHint')}</p>
      <FormStatus />
      <TextAreaField name="reason" label={t('reason')} maxLength={400} />
      <div>
        <SubmitButton kind="danger">{t('retire')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}
