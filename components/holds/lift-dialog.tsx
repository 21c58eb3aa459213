'use client';

import { useState } from 'react';
import { object, string } from 'yup';
import { FormStatus } from '@/components/forms/form-status';
import { PasswordField } from '@/components/forms/password-field';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextAreaField } from '@/components/forms/text-field';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import type { Hold } from '@/services/contracts/parts';

function LiftForm({ hold, onLifted }: { hold: Hold; onLifted: () => void }) {
  const t = useMessages('holds');
  const form = useProblemForm({
    initialValues: { reason: '', password: '' },
    validationSchema: object({
      reason: string().trim().min(5, t('reasonShort')).required(t('reasonShort')),
      password: string().required(t('passwordNeeded')),
    }),
    onSubmit: async (body) => {
      await sendJson(`/api/holds/${hold.id}/lift`, { body });
      onLifted();
    },
  });
  return (
    <ProblemForm form={form} label={t('lift', { number: hold.number })}>
      <p>{`${hold.target.name}: ${hold.reason}`}</p>
      <p>{t('liftHint')}</p>
      <FormStatus />
      <TextAreaField name="reason" label={t('reason')} hint={t('reasonHint')} maxLength={400} />
      <PasswordField name="password" label={t('password')} />
      <div>
        <SubmitButton>{t('liftNow')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}

/** Lifts a hold with a reason and a signature. */
export function LiftDialog({ hold, onLifted }: { hold: Hold; onLifted: () => void }) {
  const t = useMessages('holds');
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button onClick={() => setOpen(true)}>{t('lift', { number: hold.number })}</Button>
      <Dialog open={open} onClose={() => setOpen(false)} title={t('lift', { number: hold.number })}>
        <LiftForm
          hold={hold}
          onLifted={() => {
            setOpen(false);
            onLifted();
          }}
        />
      </Dialog>
    </>
  );
}
