'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { object, string } from 'yup';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { SelectField } from '@/components/forms/select-field';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextAreaField, TextField } from '@/components/forms/text-field';
import { useMessages } from '@/components/theme/use-messages';
import { lotKind, type Lot } from '@/services/contracts/parts';
import { ParentsPicker, type LotChoice } from './parents-picker';

function linesOf(text: string): string[] {
  return text
    .split('\n')
    .map((line) => line.trim())
    .filter((line) => line !== '');
}

/** 'name: value' lines as attributes. */
function attributesOf(text: string): Record<string, string> {
  return Object.fromEntries(
    linesOf(text).map((line) => {
      const colon = line.indexOf(':');
      return [line.slice(0, colon).trim(), line.slice(colon + 1).trim()];
    }),
  );
}

/** Enters a lot with the lots it came from, and leads to it. */
export function NewLotForm() {
  const t = useMessages('lots');
  const router = useRouter();
  const [parents, setParents] = useState<LotChoice[]>([]);
  const needed = string().trim().required(t('needed'));
  const form = useProblemForm({
    initialValues: { kind: '', number: '', quantity: '', attributes: '' },
    validationSchema: object({
      kind: needed,
      number: needed,
      quantity: needed.matches(/^[1-9]\d*$/, t('whole')),
      attributes: string().test('lines', t('attributeForm'), (text) =>
        linesOf(text ?? '').every((line) => /^[^:]+:.*\S/.test(line)),
      ),
    }),
    onSubmit: async ({ kind, number, quantity, attributes }) => {
      const made = await sendJson<Lot>('/api/lots', {
        body: {
          kind,
          number,
          quantity: Number(quantity),
          parents: parents.map(({ id }) => id),
          attributes: attributesOf(attributes),
        },
      });
      router.push(`/lots/${made.id}`);
    },
  });
  return (
    <ProblemForm form={form} label={t('newLot')}>
      <FormStatus />
      <div className="grid gap-4 md:grid-cols-3">
        <SelectField
          name="kind"
          label={t('kind')}
          options={lotKind.options.map((value) => ({ value, label: t(`kinds.${value}`) }))}
        />
        <TextField name="number" label={t('number')} code maxLength={40} />
        <TextField name="quantity" label={t('quantity')} code maxLength={6} />
      </div>
      <ParentsPicker chosen={parents} onChange={setParents} />
      <TextAreaField name="attributes" label={t('attributes')} hint={t('attributesHint')} optional />
      <div>
        <SubmitButton>{t('enter')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}
