'use client';

import { object, string } from 'yup';
import { CheckField } from '@/components/forms/check-field';
import { DateField } from '@/components/forms/date-field';
import { FormStatus } from '@/components/forms/form-status';
import { PasswordField } from '@/components/forms/password-field';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { useMessages } from '@/components/theme/use-messages';
import { Dialog } from '@/components/ui/dialog';
import type { AccountAnswer } from '@/services/contracts/accounts';

interface Change {
  readonly disabled?: boolean;
  readonly releaseAuthority?: boolean;
  readonly accessUntil?: string;
  readonly initialPassword?: string;
}

function PersonForm({ person, own, onChanged }: { person: AccountAnswer; own: boolean; onChanged: () => void }) {
  const t = useMessages('accounts');
  const form = useProblemForm({
    initialValues: {
      releaseAuthority: person.releaseAuthority,
      accessUntil: '',
      disabled: person.disabledAt !== null,
      initialPassword: '',
    },
    validationSchema: object({ initialPassword: string().min(12, t('tooShort')) }),
    onSubmit: async (values) => {
      const body: Change = {
        ...(values.disabled === (person.disabledAt !== null) ? {} : { disabled: values.disabled }),
        ...(values.releaseAuthority === person.releaseAuthority ? {} : { releaseAuthority: values.releaseAuthority }),
        ...(values.accessUntil === '' ? {} : { accessUntil: values.accessUntil }),
        ...(values.initialPassword === '' ? {} : { initialPassword: values.initialPassword }),
      };
      const headers = { 'if-match': `"${String(person.version)}"` };
      await sendJson(`/api/people/${person.id}`, { method: 'PATCH', body, headers });
      onChanged();
    },
  });
  return (
    <ProblemForm form={form} label={t('changeOf', { name: person.name })}>
      <FormStatus />
      {person.role === 'reviewer' ? (
        <CheckField name="releaseAuthority" label={t('releaseAuthority')} hint={t('releaseAuthorityHint')} />
      ) : null}
      {person.role === 'auditor' ? (
        <DateField name="accessUntil" label={t('accessUntil')} hint={t('accessUntilHint')} optional />
      ) : null}
      <CheckField name="disabled" label={t('disable')} hint={t('disabledHint')} disabled={own} />
      {own ? null : (
        <PasswordField
          name="initialPassword"
          label={t('newInitialPassword')}
          hint={t('newInitialPasswordHint')}
          autoComplete="new-password"
        />
      )}
      <div>
        <SubmitButton>{t('save')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}

/** What an administrator may change of an account. */
export function PersonDialog({
  person,
  ownId,
  onClose,
  onChanged,
}: {
  person: AccountAnswer | undefined;
  ownId: string;
  onClose: () => void;
  onChanged: () => void;
}) {
  const t = useMessages('accounts');
  return (
    <Dialog open={person !== undefined} onClose={onClose} title={t('changeOf', { name: person?.name ?? '' })}>
      {person ? <PersonForm person={person} own={person.id === ownId} onChanged={onChanged} /> : null}
    </Dialog>
  );
}
