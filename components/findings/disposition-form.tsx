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
import { dispositionSentence } from '@/services/contracts/disposition-sentence';
import type { Decision, Finding } from '@/services/contracts/findings';

const decisions = ['rework', 're-interpretation', 'void', 'scrap', 'refer'] as const;
const schema = object({ reason: string().trim().min(5).required(), password: string().required() });

/** The decision with its sentence; signed with the password. */
export function DispositionForm({
  finding,
  name,
  onDecided,
}: {
  finding: Finding;
  name: string;
  onDecided: (next: Finding) => void;
}) {
  const t = useMessages('findings');
  const form = useProblemForm<{ decision: Decision; reason: string; repeat: string[]; password: string }>({
    initialValues: { decision: 'rework', reason: '', repeat: [finding.requirement.key], password: '' },
    validationSchema: schema,
    onSubmit: async ({ decision, reason, repeat, password }) => {
      const body = { decision, reason, password, ...(decision === 'rework' ? { repeat } : {}) };
      onDecided(await sendJson<Finding>(`/api/findings/${finding.number}/disposition`, { body }));
    },
  });
  const { values, setFieldValue } = form.formik;
  const repeat =
    values.decision === 'rework' ? values.repeat : ['scrap', 'refer'].includes(values.decision) ? [] : [finding.requirement.key];
  return (
    <ProblemForm form={form} label={t('decide')}>
      <FormStatus />
      <p className="text-ink-soft">{t('rule')}</p>
      <SelectField
        name="decision"
        label={t('decision')}
        options={decisions.map((value) => ({ value, label: t(`decisionOf.${value}`) }))}
      />
      {values.decision === 'rework' ? (
        <fieldset>
          <legend className="font-semibold">{t('repeat')}</legend>
          {finding.operations.map(({ key, operation, title }) => (
            <label key={key} className="flex min-h-10 items-center gap-2">
              <input
                type="checkbox"
                checked={values.repeat.includes(key)}
                disabled={key === finding.requirement.key}
                onChange={(event) =>
                  void setFieldValue(
                    'repeat',
                    event.target.checked ? [...values.repeat, key] : values.repeat.filter((one) => one !== key),
                  )
                }
              />
              {operation} {title}
            </label>
          ))}
        </fieldset>
      ) : null}
      <TextAreaField name="reason" label={t('reason')} />
      <p className="border-s-4 border-accent ps-3">
        {dispositionSentence({ name, finding: finding.number, serial: finding.part.serial, decision: values.decision, repeat })}
      </p>
      <PasswordField name="password" label={t('password')} autoComplete="current-password" />
      <SubmitButton size="capture">{t('sign')}</SubmitButton>
    </ProblemForm>
  );
}
