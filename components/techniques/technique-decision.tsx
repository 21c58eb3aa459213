'use client';

import { object, string } from 'yup';
import { FormStatus } from '@/components/forms/form-status';
import { PasswordField } from '@/components/forms/password-field';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextAreaField } from '@/components/forms/text-field';
import { useMethodWords } from '@/components/personnel/method-words';
import { useMessages } from '@/components/theme/use-messages';
import type { Technique, withdrawTechnique } from '@/services/contracts/techniques';
import type { AnswerOf } from '@/services/contracts/operation';

export type Decided = Technique & Partial<Pick<AnswerOf<typeof withdrawTechnique>, 'suspects'>>;

/** Approves or withdraws an issue, signed with the password. */
export function TechniqueDecision({
  kind,
  technique,
  me,
  onDone,
}: {
  kind: 'approve' | 'withdraw';
  technique: Technique;
  /** Name of the signer. */
  me: string;
  onDone: (answer: Decided) => void;
}) {
  const t = useMessages('techniques');
  const methodWords = useMethodWords();
  const withdraws = kind === 'withdraw';
  const form = useProblemForm({
    initialValues: { reason: '', password: '' },
    validationSchema: object({
      reason: withdraws ? string().trim().required(t('needed')).min(5, t('reasonShort')) : string(),
      password: string().required(t('needed')),
    }),
    onSubmit: async ({ reason, password }) =>
      onDone(
        await sendJson<Decided>(`/api/techniques/${technique.id}/${withdraws ? 'withdrawal' : 'approval'}`, {
          body: withdraws ? { reason, password } : { password },
        }),
      ),
  });
  const { number, issue, method } = technique;
  const sentence = withdraws
    ? t('withdrawSentence', { me, number, issue })
    : t('approveSentence', { me, number, issue, method: methodWords(method) });
  return (
    <ProblemForm form={form} label={t(kind)}>
      <p className="border-s-4 border-accent ps-3">{sentence}</p>
      <FormStatus />
      {withdraws ? <TextAreaField name="reason" label={t('reason')} maxLength={400} /> : null}
      <PasswordField name="password" label={t('password')} />
      <div>
        <SubmitButton kind={withdraws ? 'danger' : 'primary'}>{t('sign')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}
