'use client';

import { object, string } from 'yup';
import { FormStatus } from '@/components/forms/form-status';
import { PasswordField } from '@/components/forms/password-field';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { SelectField } from '@/components/forms/select-field';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextAreaField } from '@/components/forms/text-field';
import { useMessages } from '@/components/theme/use-messages';
import type { SuspectGroup, SuspectList } from '@/services/contracts/suspects';

/** Decides about one group of a list, signed with the password. */
export function CloseGroupForm({
  listId,
  group,
  onClosed,
}: {
  listId: string;
  group: SuspectGroup;
  onClosed: (list: SuspectList) => void;
}) {
  const t = useMessages('suspects');
  const form = useProblemForm({
    initialValues: { decision: '', reason: '', password: '' },
    validationSchema: object({
      decision: string().required(t('needed')),
      reason: string().trim().min(10, t('reasonShort')).required(t('reasonShort')),
      password: string().required(t('needed')),
    }),
    onSubmit: async (body) =>
      onClosed(await sendJson<SuspectList>(`/api/suspects/${listId}/groups/${group.id}/closing`, { body })),
  });
  const { decision } = form.formik.values;
  const hints = { 'no-effect': t('noEffectHint'), repeat: t('repeatHint') } as const;
  const chosen = decision === 'no-effect' || decision === 'repeat' ? decision : undefined;
  return (
    <ProblemForm form={form} label={t('decide')}>
      <FormStatus />
      <SelectField
        name="decision"
        label={t('decision')}
        options={[
          { value: 'no-effect', label: t('noEffect') },
          // What has gone is recalled before anybody can inspect it again.
          { value: 'repeat', label: t('repeat'), disabled: group.gone },
        ]}
      />
      {chosen ? (
        <>
          <p className="text-ink-soft">{hints[chosen]}</p>
          <p className="border-s-4 border-accent ps-3">{t(`sentence.${chosen}`)}</p>
        </>
      ) : null}
      <TextAreaField name="reason" label={t('decisionReason')} hint={t('reasonHint')} maxLength={400} />
      <PasswordField name="password" label={t('password')} />
      <div>
        <SubmitButton>{t('sign')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}
