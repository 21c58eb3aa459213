'use client';

import Link from 'next/link';
import { useState } from 'react';
import { object, string } from 'yup';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextAreaField } from '@/components/forms/text-field';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Notice } from '@/components/ui/notice';
import type { Hold } from '@/services/contracts/parts';

interface Target {
  readonly kind: 'part' | 'lot';
  readonly id: string;
  /** As people call it: a serial, or 'heat H-26-118'. */
  readonly name: string;
}

function HoldForm({ target, onPlaced, onCancel }: { target: Target; onPlaced: (hold: Hold) => void; onCancel: () => void }) {
  const t = useMessages('holds');
  const form = useProblemForm({
    initialValues: { reason: '' },
    validationSchema: object({ reason: string().trim().min(5, t('reasonShort')).required(t('reasonShort')) }),
    onSubmit: async ({ reason }) =>
      onPlaced(await sendJson<Hold>('/api/holds', { body: { target: { kind: target.kind, id: target.id }, reason } })),
  });
  return (
    <ProblemForm form={form} label={t('holdTitle', { name: target.name })}>
      {target.kind === 'lot' ? <p>{t('lotWarns')}</p> : null}
      <FormStatus />
      <TextAreaField name="reason" label={t('reason')} hint={t('reasonHint')} maxLength={400} />
      <div className="flex gap-3">
        <SubmitButton kind="danger">{t('place')}</SubmitButton>
        <Button onClick={onCancel}>{t('cancel')}</Button>
      </div>
    </ProblemForm>
  );
}

/** What was already released when the hold was placed, to be recalled. */
export function RecallList({ hold }: { hold: Hold }) {
  const t = useMessages('holds');
  return (
    <ul className="list-disc pl-5">
      {hold.recall.map((one) => (
        <li key={`${one.part} ${one.certificate}`}>
          <Link className="text-accent underline underline-offset-4" href={`/certificates/${one.certificate}`}>
            {t('goneLine', { serial: one.serial, certificate: one.certificate, customer: one.customer })}
          </Link>
        </li>
      ))}
    </ul>
  );
}

/** Places a hold on a part or lot, and answers what must be recalled. */
export function HoldDialog({ target, onPlaced }: { target: Target; onPlaced: () => void }) {
  const t = useMessages('holds');
  const [open, setOpen] = useState(false);
  const [placed, setPlaced] = useState<Hold>();
  const close = () => {
    setOpen(false);
    if (placed) onPlaced();
    setPlaced(undefined);
  };
  return (
    <>
      <Button kind="danger" onClick={() => setOpen(true)}>
        {t('hold')}
      </Button>
      <Dialog open={open} onClose={close} title={t('holdTitle', { name: target.name })}>
        {placed ? (
          <div className="flex flex-col gap-4">
            <Notice kind="held" title={t('done', { number: placed.number, count: placed.held })} />
            {placed.recall.length > 0 ? (
              <Notice kind="refusal" title={t('gone')}>
                <RecallList hold={placed} />
              </Notice>
            ) : null}
            <div>
              <Button onClick={close}>{t('close')}</Button>
            </div>
          </div>
        ) : (
          <HoldForm target={target} onPlaced={setPlaced} onCancel={close} />
        )}
      </Dialog>
    </>
  );
}
