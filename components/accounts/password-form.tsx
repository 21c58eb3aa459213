'use client';

import { useState } from 'react';
import { object, ref, string } from 'yup';
import { FormStatus } from '@/components/forms/form-status';
import { PasswordField } from '@/components/forms/password-field';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { useMessages } from '@/components/theme/use-messages';
import { Notice } from '@/components/ui/notice';

/** The own password, with the present one; other sessions end. */
export function PasswordForm({ email, onDone }: { email: string; onDone: () => void }) {
  const t = useMessages('accounts');
  const [done, setDone] = useState(false);
  const form = useProblemForm({
    initialValues: { password: '', newPassword: '', again: '' },
    validationSchema: object({
      password: string().required(t('needed')),
      newPassword: string().required(t('needed')).min(12, t('tooShort')).notOneOf([email], t('isEmail')),
      again: string()
        .required(t('needed'))
        .oneOf([ref('newPassword')], t('differ')),
    }),
    onSubmit: async ({ password, newPassword }, { resetForm }) => {
      setDone(false);
      await sendJson('/api/account/password', { body: { password, newPassword } });
      resetForm();
      setDone(true);
      onDone();
    },
  });
  return (
    <ProblemForm form={form} label={t('change')}>
      {done ? <Notice kind="done" title={t('changed')} /> : null}
      <FormStatus />
      <PasswordField name="password" label={t('oldPassword')} />
      <PasswordField name="newPassword" label={t('newPassword')} hint={t('newPasswordHint')} autoComplete="new-password" />
      <PasswordField name="again" label={t('repeatPassword')} autoComplete="new-password" />
      <div>
        <SubmitButton>{t('change')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}
