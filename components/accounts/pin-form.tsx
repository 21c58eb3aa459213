'use client';

import { useState } from 'react';
import { object, string } from 'yup';
import { FormStatus } from '@/components/forms/form-status';
import { PasswordField } from '@/components/forms/password-field';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { useMessages } from '@/components/theme/use-messages';
import { Notice } from '@/components/ui/notice';

/** The PIN for signing at the bench; the password sets and unlocks it. */
export function PinForm({ onDone }: { onDone: () => void }) {
  const t = useMessages('accounts');
  const [done, setDone] = useState(false);
  const form = useProblemForm({
    initialValues: { pin: '', password: '' },
    validationSchema: object({
      pin: string()
        .required(t('needed'))
        .matches(/^[0-9]{6,12}$/, t('pinForm')),
      password: string().required(t('needed')),
    }),
    onSubmit: async (values, { resetForm }) => {
      setDone(false);
      await sendJson('/api/account/pin', { method: 'PUT', body: values });
      resetForm();
      setDone(true);
      onDone();
    },
  });
  return (
    <ProblemForm form={form} label={t('setPin')}>
      {done ? <Notice kind="done" title={t('pinSet')} /> : null}
      <FormStatus />
      <PasswordField name="pin" label={t('pin')} hint={t('pinHint')} autoComplete="one-time-code" />
      <PasswordField name="password" label={t('password')} />
      <div>
        <SubmitButton>{t('setPin')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}
