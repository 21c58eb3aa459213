'use client';

import { useState } from 'react';
import { object, string } from 'yup';
import { CheckField } from '@/components/forms/check-field';
import { DateField } from '@/components/forms/date-field';
import { FormStatus } from '@/components/forms/form-status';
import { PasswordField } from '@/components/forms/password-field';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { SelectField } from '@/components/forms/select-field';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextField } from '@/components/forms/text-field';
import { useMessages } from '@/components/theme/use-messages';
import { Notice } from '@/components/ui/notice';
import type { AccountAnswer } from '@/services/contracts/accounts';
import { role, type Role } from '@/services/contracts/common';

const initialValues = {
  ...{ name: '', email: '', role: 'inspector' as Role, customer: '', accessUntil: '' },
  ...{ releaseAuthority: false, initialPassword: '' },
};

/** A new account; what it asks depends on the role. */
export function NewPersonForm({ customers, onMade }: { customers: readonly { id: string; name: string }[]; onMade: () => void }) {
  const t = useMessages('accounts');
  const words = useMessages('shell');
  const [made, setMade] = useState<string>();
  const form = useProblemForm({
    initialValues,
    validationSchema: object({
      name: string().trim().required(t('needed')),
      email: string().trim().required(t('needed')),
      initialPassword: string().required(t('needed')).min(12, t('tooShort')),
      customer: string().when('role', { is: 'customer-quality', then: (one) => one.required(t('needed')) }),
      accessUntil: string().when('role', { is: 'auditor', then: (one) => one.required(t('needed')) }),
    }),
    onSubmit: async ({ customer, accessUntil, releaseAuthority, ...rest }, { resetForm }) => {
      setMade(undefined);
      const answer = await sendJson<AccountAnswer>('/api/people', {
        body: {
          ...rest,
          ...(rest.role === 'customer-quality' ? { customer } : {}),
          ...(rest.role === 'auditor' ? { accessUntil } : {}),
          ...(rest.role === 'reviewer' ? { releaseAuthority } : {}),
        },
      });
      resetForm();
      setMade(answer.name);
      onMade();
    },
  });
  const chosen = form.formik.values.role;
  return (
    <ProblemForm form={form} label={t('newPerson')}>
      {made === undefined ? null : <Notice kind="done" title={t('created', { name: made })} />}
      <FormStatus />
      <TextField name="name" label={t('name')} autoComplete="off" />
      <TextField name="email" type="email" label={t('email')} autoComplete="off" />
      <SelectField
        name="role"
        label={t('role')}
        emptyLabel={null}
        options={role.options.map((value) => ({ value, label: words(`roles.${value}`) }))}
      />
      {chosen === 'customer-quality' ? (
        <SelectField
          name="customer"
          label={t('customer')}
          options={customers.map(({ id, name }) => ({ value: id, label: name }))}
        />
      ) : null}
      {chosen === 'auditor' ? <DateField name="accessUntil" label={t('accessUntil')} hint={t('accessUntilHint')} /> : null}
      {chosen === 'reviewer' ? (
        <CheckField name="releaseAuthority" label={t('releaseAuthority')} hint={t('releaseAuthorityHint')} />
      ) : null}
      <PasswordField
        name="initialPassword"
        label={t('initialPassword')}
        hint={t('initialPasswordHint')}
        autoComplete="new-password"
      />
      <div>
        <SubmitButton>{t('create')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}
