'use client';

import Link from 'next/link';
import { object, string } from 'yup';
import { FormStatus } from '@/components/forms/form-status';
import { PasswordField } from '@/components/forms/password-field';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextField } from '@/components/forms/text-field';
import { useMessages } from '@/components/theme/use-messages';

const schema = object({ email: string().trim().required(), password: string().required() });

/** Only a path of this product may follow a sign-in. */
function ownPath(next: string | undefined): string {
  return next?.startsWith('/') && !next.startsWith('//') && !next.includes('\\') ? next : '/';
}

/** E-mail and password; afterwards the page that was asked for. */
export function SignInForm({ next }: { next?: string | undefined }) {
  const t = useMessages('accounts');
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
      <FormStatus />
      <TextField name="email" label={t('email')} />
      <PasswordField name="password" label={t('password')} autoComplete="current-password" />
      <SubmitButton size="capture">{t('signIn')}</SubmitButton>
      <Link href="/verify" className="text-accent underline underline-offset-4">
        {t('verify')}
      </Link>
    </ProblemForm>
  );
}
