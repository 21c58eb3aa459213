'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { object, string } from 'yup';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextField } from '@/components/forms/text-field';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import type { Lot } from '@/services/contracts/parts';

function SplitForm({ lot, onSplit }: { lot: Lot; onSplit: () => void }) {
  const t = useMessages('lots');
  const router = useRouter();
  const needed = string().trim().required(t('needed'));
  const form = useProblemForm({
    initialValues: { number: '', quantity: '' },
    validationSchema: object({ number: needed, quantity: needed.matches(/^[1-9]\d*$/, t('whole')) }),
    onSubmit: async ({ number, quantity }) => {
      const made = await sendJson<Lot>(`/api/lots/${lot.id}/split`, { body: { number, quantity: Number(quantity) } });
      onSplit();
      router.push(`/lots/${made.id}`);
    },
  });
  return (
    <ProblemForm form={form} label={t('split')}>
      <p>{t('splitHint', { most: lot.quantity - 1 })}</p>
      <FormStatus />
      <TextField name="number" label={t('newNumber')} code maxLength={40} />
      <TextField name="quantity" label={t('take')} code maxLength={6} />
      <div>
        <SubmitButton>{t('split')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}

/** Takes a quantity into a new lot; the remainder stays. */
export function SplitDialog({ lot, onSplit }: { lot: Lot; onSplit: () => void }) {
  const t = useMessages('lots');
  const [open, setOpen] = useState(false);
  const close = () => setOpen(false);
  return (
    <>
      <Button onClick={() => setOpen(true)}>{t('split')}</Button>
      <Dialog open={open} onClose={close} title={t('splitTitle', { lot: lot.number })}>
        <SplitForm
          lot={lot}
          onSplit={() => {
            close();
            onSplit();
          }}
        />
      </Dialog>
    </>
  );
}
