'use client';

import { object, string } from 'yup';
import { DecimalField } from '@/components/forms/decimal-field';
import { decimalFrom } from '@/components/forms/decimal-text';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { SelectField } from '@/components/forms/select-field';
import { sendJson } from '@/components/forms/send-json';
import { TextField } from '@/components/forms/text-field';
import { MethodCaution } from '@/components/inspections/bench-head';
import { useMethodWords } from '@/components/personnel/method-words';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import type { CheckStanding, recordCheck } from '@/services/contracts/checks';
import { method } from '@/services/contracts/common';
import type { AnswerOf } from '@/services/contracts/operation';
import { inWindow } from '@/services/engine/quantity/window';
import { useWindowWords } from './check-words';

export type CheckAnswer = AnswerOf<typeof recordCheck>;

function initialValues(of: CheckStanding | undefined) {
  return {
    ...{ scope: of?.scope ?? '', title: of?.title ?? '', method: of?.method ?? '', kind: of?.kind ?? 'opening' },
    validHours: of ? String(of.validHours) : '24',
    ...{ value: '', unit: of?.window?.unit ?? of?.last?.unit ?? '', note: '', result: '' },
  };
}
type Values = ReturnType<typeof initialValues>;

/** What is sent: empty fields left out, and no unit without a value. */
function bodyOf({ value, unit, note, validHours, ...rest }: Values): Record<string, unknown> {
  const read = decimalFrom(value) ?? value.trim();
  return {
    ...{ ...rest, validHours: Number(validHours) },
    ...(read === '' ? {} : { value: read, ...(unit.trim() === '' ? {} : { unit: unit.trim() }) }),
    ...(note.trim() === '' ? {} : { note: note.trim() }),
  };
}

/** Is the value read inside the window? Undefined while that cannot be said. */
function judged({ value, unit }: Values, of: CheckStanding | undefined): boolean | undefined {
  const read = decimalFrom(value);
  if (read === undefined || !of?.window) return undefined;
  return inWindow(read, unit.trim(), of.window) ?? undefined;
}

function NamedFields() {
  const t = useMessages('checks');
  const methodWords = useMethodWords();
  return (
    <>
      <TextField name="scope" label={t('scope')} hint={t('scopeHint')} maxLength={60} />
      <TextField name="title" label={t('check')} maxLength={160} />
      <SelectField
        name="method"
        label={t('method')}
        options={method.options.map((value) => ({ value, label: methodWords(value) }))}
      />
      <SelectField
        name="kind"
        label={t('kind')}
        hint={t('kindHint')}
        emptyLabel={null}
        options={(['opening', 'bracketing'] as const).map((value) => ({ value, label: t(`kinds.${value}`) }))}
      />
      <TextField name="validHours" label={t('validHours')} code maxLength={4} />
    </>
  );
}

function Judgement({ inside, of }: { inside: boolean | undefined; of: CheckStanding | undefined }) {
  const t = useMessages('checks');
  const windowWords = useWindowWords();
  if (!of?.window) return null;
  if (inside === false) return <Notice kind="refusal" title={t('outside')} />;
  return <p className="text-ink-soft">{inside === true ? t('inside') : `${t('window')}: ${windowWords(of.window)}`}</p>;
}

/** One check, entered with one hand: the value, and one press for good or failed. */
export function CheckEntry({ of, onRecorded }: { of: CheckStanding | undefined; onRecorded: (answer: CheckAnswer) => void }) {
  const t = useMessages('checks');
  const needed = string().trim().required(t('needed'));
  const form = useProblemForm({
    initialValues: initialValues(of),
    validationSchema: object({
      ...{ scope: needed, title: needed, method: needed },
      validHours: needed.matches(/^[1-9]\d{0,3}$/, t('whole')),
    }),
    onSubmit: async (values) => onRecorded(await sendJson<CheckAnswer>('/api/checks', { body: bodyOf(values) })),
  });
  const { formik } = form;
  const inside = judged(formik.values, of);
  const finish = (result: 'good' | 'failed') => {
    void formik.setFieldValue('result', result).then(() => formik.submitForm());
  };
  return (
    <ProblemForm form={form} label={t('record')} className="flex flex-col gap-4 [&_.field]:min-h-capture [&_.field]:text-lg">
      <MethodCaution method={formik.values.method} />
      <FormStatus labelOf={(path) => (path === 'result' ? t('result') : path)} />
      {of ? null : <NamedFields />}
      <div className="grid grid-cols-[2fr_1fr] gap-3">
        <DecimalField name="value" label={t('value')} optional={!of?.window} />
        <TextField name="unit" label={t('unit')} optional={!of?.window} maxLength={20} />
      </div>
      <Judgement inside={inside} of={of} />
      <TextField name="note" label={t('note')} optional maxLength={400} />
      <p className="text-sm text-ink-soft">{t('warn', { scope: formik.values.scope || t('scope') })}</p>
      <div className="grid grid-cols-2 gap-3">
        <Button size="capture" kind="danger" glyph="cross" busy={formik.isSubmitting} onClick={() => finish('failed')}>
          {t('failed')}
        </Button>
        <Button
          size="capture"
          kind="primary"
          glyph="closed"
          busy={formik.isSubmitting}
          disabled={inside === false}
          onClick={() => finish('good')}
        >
          {t('good')}
        </Button>
      </div>
    </ProblemForm>
  );
}
