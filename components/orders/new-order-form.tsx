'use client';

import { useState } from 'react';
import { array, object, string } from 'yup';
import { CheckField } from '@/components/forms/check-field';
import { DateField } from '@/components/forms/date-field';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { SelectField } from '@/components/forms/select-field';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextAreaField, TextField } from '@/components/forms/text-field';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { statementsOfText } from '@/services/contracts/order-clauses';
import type { Customer, Order } from '@/services/contracts/orders';
import type { Drawing } from '@/services/contracts/plans';

interface Props {
  readonly customers: readonly Customer[];
  readonly drawings: readonly Drawing[];
  readonly onDone: () => void;
}

const emptyLine = { drawing: '', quantity: '', dueOn: '', images: false, values: false, statements: '' };

/** What the line demands beside the drawing. */
function LineClauses({ place }: { readonly place: number }) {
  const t = useMessages('orders');
  const line = (place + 1) * 10;
  return (
    <div className="col-span-full grid gap-x-4 md:grid-cols-[minmax(0,2fr)_minmax(0,1fr)]">
      <TextAreaField
        optional
        name={`lines.${place}.statements`}
        label={t('statementsOf', { line })}
        hint={t('statementsHint')}
        rows={2}
      />
      <div>
        <CheckField name={`lines.${place}.images`} label={t('imagesOf', { line })} />
        <CheckField name={`lines.${place}.values`} label={t('valuesOf', { line })} />
      </div>
    </div>
  );
}

/** Enters a purchase order with its lines; only drawings of the chosen customer can be ordered. */
export function NewOrderForm({ customers, drawings, onDone }: Props) {
  const t = useMessages('orders');
  const [done, setDone] = useState('');
  const needed = string().trim().required(t('needed'));
  const statementLines = string().test('lines', t('statementForm'), (text = '') => {
    const written = text.split('\n').filter((one) => one.trim() !== '');
    return statementsOfText(text).length === written.length;
  });
  const form = useProblemForm({
    initialValues: { customer: '', purchaseOrder: '', lines: [emptyLine] },
    validationSchema: object({
      customer: needed,
      purchaseOrder: needed,
      lines: array().of(
        object({ drawing: needed, quantity: needed.matches(/^[1-9]\d*$/, t('whole')), statements: statementLines }),
      ),
    }),
    onSubmit: async ({ lines, ...head }, { resetForm }) => {
      setDone('');
      const body = {
        ...head,
        lines: lines.map(({ drawing, quantity, dueOn, images, values: shown, statements }) => {
          const [number = '', revision = ''] = drawing.split('\n');
          const clauses = { images, values: shown, statements: statementsOfText(statements) };
          return { drawing: number, revision, quantity: Number(quantity), clauses, ...(dueOn === '' ? {} : { dueOn }) };
        }),
      };
      const { number } = await sendJson<Order>('/api/orders', { body });
      resetForm();
      setDone(number);
      onDone();
    },
  });
  const { values, setFieldValue } = form.formik;
  const choices = drawings
    .filter(({ customer }) => customer.code === values.customer)
    .flatMap(({ number, title, revisions }) =>
      revisions.map(({ revision }) => ({ value: `${number}\n${revision}`, label: `${number} ${revision} ${title}` })),
    );
  return (
    <ProblemForm form={form} label={t('newOrder')}>
      {done === '' ? null : <Notice kind="done" title={t('done', { number: done })} />}
      <FormStatus />
      <div className="grid gap-4 md:grid-cols-2">
        <SelectField
          name="customer"
          label={t('customer')}
          options={customers.map(({ code, name }) => ({ value: code, label: name }))}
        />
        <TextField name="purchaseOrder" label={t('purchaseOrder')} code maxLength={60} />
      </div>
      {values.customer !== '' && choices.length === 0 ? <Notice title={t('noDrawing')} /> : null}
      {values.lines.map((_, place) => (
        <div key={place} className="grid items-end gap-4 md:grid-cols-[minmax(0,2fr)_8rem_11rem_auto]">
          <SelectField name={`lines.${place}.drawing`} label={t('drawing', { line: (place + 1) * 10 })} options={choices} />
          <TextField name={`lines.${place}.quantity`} label={t('quantityOf', { line: (place + 1) * 10 })} code maxLength={6} />
          <DateField name={`lines.${place}.dueOn`} label={t('dueOf', { line: (place + 1) * 10 })} optional />
          {values.lines.length > 1 ? (
            <Button
              kind="bare"
              onClick={() =>
                void setFieldValue(
                  'lines',
                  values.lines.filter((__, at) => at !== place),
                )
              }
            >
              {t('removeLine', { line: (place + 1) * 10 })}
            </Button>
          ) : null}
          <LineClauses place={place} />
        </div>
      ))}
      <div className="flex gap-3">
        <Button onClick={() => void setFieldValue('lines', [...values.lines, emptyLine])}>{t('addLine')}</Button>
        <SubmitButton>{t('enter')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}
