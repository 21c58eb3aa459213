'use client';

import { useRouter } from 'next/navigation';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { SelectField } from '@/components/forms/select-field';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { keepChoice } from '@/components/theme/keep-choice';
import { localeCookie, locales } from '@/components/theme/locales';
import { useMessages } from '@/components/theme/use-messages';
import type { OwnAccount } from '@/services/contracts/accounts';

/** The language of the account, put in force on this workstation too. */
export function LanguageForm({ locale, onKept }: { locale: OwnAccount['locale']; onKept: (next: OwnAccount) => void }) {
  const t = useMessages('accounts');
  const words = useMessages('shell');
  const router = useRouter();
  const form = useProblemForm({
    initialValues: { locale },
    enableReinitialize: true,
    onSubmit: async (values) => {
      onKept(await sendJson<OwnAccount>('/api/account', { method: 'PATCH', body: values }));
      keepChoice(localeCookie, values.locale);
      router.refresh();
    },
  });
  return (
    <ProblemForm form={form} label={t('language')} className="flex flex-wrap items-end gap-3">
      <FormStatus />
      <SelectField
        name="locale"
        label={t('language')}
        hint={t('languageHint')}
        emptyLabel={null}
        options={locales.map((value) => ({ value, label: words(`languages.${value}`) }))}
      />
      <SubmitButton kind="quiet">{t('keep')}</SubmitButton>
    </ProblemForm>
  );
}
