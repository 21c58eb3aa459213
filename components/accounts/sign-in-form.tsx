'use client';

import Link from 'next/link';
import { useSyncExternalStore } from 'react';
import { object, string } from 'yup';
import { FormStatus } from '@/components/forms/form-status';
import { PasswordField } from '@/components/forms/password-field';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextField } from '@/components/forms/text-field';
import { useMessages } from '@/components/theme/use-messages';
import { Notice } from '@/components/ui/notice';
import { ownPath } from './own-path';

const schema = object({ email: string().trim().required(), password: string().required() });

const never = () => () => undefined;

/** E-mail and password; afterwards the page that was asked for. */
export function SignInForm({ next, ended = false }: { next?: string | undefined; ended?: boolean }) {
  const t = useMessages('accounts');
  // Before the page's scripts run, the browser itself would send the form: with the password in the address.
  const ready = useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
  const form = useProblemForm({
    initialValues: { email: '', password: '' },
    validationSchema: schema,
    onSubmit: async (values) => {
      await sendJson('/api/session', { body: values });
      // A full load, so that nothing of the stranger's page stays.
      window.location.replace(ownPath(next));
    },
  });
  return (
    <ProblemForm form={form} label={t('signIn')}>
      {ended && form.problem === undefined ? (
        <Notice kind="unsure" title={t('ended')}>
          {t('endedDetail')}
        </Notice>
      ) : null}
      <FormStatus />
      <TextField name="email" type="email" autoComplete="username" label={t('email')} />
      <PasswordField name="password" label={t('password')} autoComplete="current-password" />
      <SubmitButton size="capture" disabled={!ready}>
        {t('signIn')}
      </SubmitButton>
      <Link href="/verify" className="text-accent underline underline-offset-4">
        {t('verify')}
      </Link>
    </ProblemForm>
  );
}
