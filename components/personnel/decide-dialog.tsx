'use client';

import { object, string } from 'yup';
import { FormStatus } from '@/components/forms/form-status';
import { PasswordField } from '@/components/forms/password-field';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextAreaField } from '@/components/forms/text-field';
import { useMessages } from '@/components/theme/use-messages';
import { Dialog } from '@/components/ui/dialog';
import type { Authorisation } from '@/services/contracts/personnel';
import { useMethodWords } from './method-words';

export interface Decision {
  readonly kind: 'grant' | 'withdraw';
  readonly row: Authorisation;
}

function DecideForm({ decision: { kind, row }, me, onDone }: { decision: Decision; me: string; onDone: () => void }) {
  const t = useMessages('personnel');
  const methodWords = useMethodWords();
  const withdraws = kind === 'withdraw';
  const form = useProblemForm({
    initialValues: { reason: '', password: '' },
    validationSchema: object({
      reason: withdraws ? string().trim().required(t('needed')).min(5, t('reasonForm')) : string(),
      password: string().required(t('needed')),
    }),
    onSubmit: async ({ reason, password }) => {
      const end = withdraws ? 'withdrawal' : 'approval';
      await sendJson(`/api/authorisations/${row.id}/${end}`, { body: withdraws ? { reason, password } : { password } });
      onDone();
    },
  });
  const parameters = {
    ...{ me, name: row.person.name, method: methodWords(row.method), level: t(`levels.${row.level}`) },
    ...{ validFrom: row.validFrom, validTo: row.validTo },
  };
  return (
    <ProblemForm form={form} label={t(kind)}>
      <p className="border-s-4 border-accent ps-3">{t(withdraws ? 'withdrawSentence' : 'grantSentence', parameters)}</p>
      <FormStatus />
      {withdraws ? <TextAreaField name="reason" label={t('reason')} /> : null}
      <PasswordField name="password" label={t('password')} />
      <div>
        <SubmitButton kind={withdraws ? 'danger' : 'primary'}>{t('sign')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}

/** Grants or withdraws an authorisation, signed with the password. */
export function DecideDialog({
  decision,
  me,
  onClose,
  onDone,
}: {
  decision: Decision | undefined;
  /** Name of the signer. */
  me: string;
  onClose: () => void;
  onDone: () => void;
}) {
  const t = useMessages('personnel');
  return (
    <Dialog open={decision !== undefined} onClose={onClose} title={t(decision?.kind ?? 'grant')}>
      {decision ? <DecideForm decision={decision} me={me} onDone={onDone} /> : null}
    </Dialog>
  );
}
