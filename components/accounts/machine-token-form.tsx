'use client';

import { useState } from 'react';
import { array, object, string } from 'yup';
import { FieldError } from '@/components/forms/field-frame';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextField } from '@/components/forms/text-field';
import { useMessages } from '@/components/theme/use-messages';
import { Notice } from '@/components/ui/notice';

/** A new token: what it is for, and the calls it may make. The answer is shown once. */
export function MachineTokenForm({ mayName, onMade }: { mayName: readonly string[]; onMade: () => void }) {
  const t = useMessages('accounts');
  const [token, setToken] = useState<string>();
  const form = useProblemForm({
    initialValues: { name: '', calls: [] as string[] },
    validationSchema: object({ name: string().trim().required(t('needed')), calls: array().of(string()).min(1, t('needed')) }),
    onSubmit: async (values, { resetForm }) => {
      setToken(undefined);
      const made = await sendJson<{ token: string }>('/api/machine-tokens', { body: values });
      resetForm();
      setToken(made.token);
      onMade();
    },
  });
  const { values, setFieldValue, errors, submitCount } = form.formik;
  const turn = (call: string, on: boolean) =>
    void setFieldValue('calls', on ? [...values.calls, call] : values.calls.filter((one) => one !== call));
  return (
    <ProblemForm form={form} label={t('makeToken')}>
      {token === undefined ? null : (
        <Notice kind="unsure" title={t('tokenOnce')}>
          <p className="my-1 font-mono break-all select-all">{token}</p>
          <p>{t('tokenOnceDetail')}</p>
        </Notice>
      )}
      <FormStatus />
      <TextField name="name" label={t('tokenName')} autoComplete="off" />
      <fieldset aria-describedby="calls-error">
        <legend className="font-semibold">{t('tokenCalls')}</legend>
        <div className="grid gap-x-4 sm:grid-cols-2 lg:grid-cols-3">
          {mayName.map((call) => (
            <label key={call} className="flex min-h-9 items-center gap-2 font-mono text-sm">
              <input
                type="checkbox"
                className="size-5 shrink-0"
                checked={values.calls.includes(call)}
                onChange={(event) => turn(call, event.target.checked)}
              />
              {call}
            </label>
          ))}
        </div>
        {submitCount > 0 && typeof errors.calls === 'string' ? <FieldError id="calls-error">{errors.calls}</FieldError> : null}
      </fieldset>
      <div>
        <SubmitButton>{t('makeToken')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}
