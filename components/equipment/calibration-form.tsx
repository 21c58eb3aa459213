'use client';

import { object, string } from 'yup';
import { DateField } from '@/components/forms/date-field';
import { DecimalField } from '@/components/forms/decimal-field';
import { decimalFrom } from '@/components/forms/decimal-text';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { SelectField } from '@/components/forms/select-field';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextField } from '@/components/forms/text-field';
import { MethodCaution } from '@/components/inspections/bench-head';
import { useMessages } from '@/components/theme/use-messages';
import { Notice } from '@/components/ui/notice';
import type { recordCalibration, Equipment } from '@/services/contracts/equipment';
import type { AnswerOf } from '@/services/contracts/operation';

export type CalibrationAnswer = AnswerOf<typeof recordCalibration>;

const founds = ['good', 'failed', 'not-taken'] as const;
const lefts = ['good', 'failed'] as const;

/** The fields that are filled; an empty one is left out, a decimal is sent with a point. */
function bodyOf(values: Readonly<Record<string, string>>): Record<string, string> {
  const decimals = ['rangeLower', 'rangeUpper', 'bias'];
  return Object.fromEntries(
    Object.entries(values)
      .map(([name, text]) => [name, decimals.includes(name) ? (decimalFrom(text) ?? text.trim()) : text.trim()] as const)
      .filter(([, text]) => text !== ''),
  );
}

/** Records a calibration of one function and range; says beforehand when that holds parts. */
export function CalibrationForm({
  equipment,
  onRecorded,
}: {
  equipment: Equipment;
  onRecorded: (answer: CalibrationAnswer) => void;
}) {
  const t = useMessages('equipment');
  const last = equipment.calibrations[0];
  const needed = string().trim().required(t('needed'));
  const form = useProblemForm({
    initialValues: {
      function: last?.function ?? 'all',
      rangeLower: last?.rangeLower ?? '',
      rangeUpper: last?.rangeUpper ?? '',
      rangeUnit: last?.rangeUnit ?? '',
      asFound: '',
      bias: '',
      asLeft: '',
      calibratedOn: '',
      dueOn: '',
      certificate: '',
    },
    validationSchema: object({ function: needed, asFound: needed, asLeft: needed, calibratedOn: needed, dueOn: needed }),
    onSubmit: async (values) =>
      onRecorded(await sendJson<CalibrationAnswer>(`/api/equipment/${equipment.id}/calibrations`, { body: bodyOf(values) })),
  });
  return (
    <ProblemForm form={form} label={t('record')}>
      <FormStatus />
      <MethodCaution method={equipment.method} />
      <TextField name="function" label={t('function')} hint={t('functionHint')} maxLength={80} />
      <div className="grid grid-cols-3 gap-3">
        <DecimalField name="rangeLower" label={t('rangeLower')} optional />
        <DecimalField name="rangeUpper" label={t('rangeUpper')} optional />
        <TextField name="rangeUnit" label={t('rangeUnit')} optional maxLength={12} />
      </div>
      <div className="grid gap-3 md:grid-cols-2">
        <SelectField
          name="asFound"
          label={t('asFound')}
          options={founds.map((value) => ({ value, label: t(`found.${value}`) }))}
        />
        <SelectField name="asLeft" label={t('asLeft')} options={lefts.map((value) => ({ value, label: t(`left.${value}`) }))} />
      </div>
      {form.formik.values.asFound === 'failed' ? (
        <Notice kind="held" title={t('warnTitle')}>
          {t('warn', { number: equipment.number })}
        </Notice>
      ) : null}
      <DecimalField name="bias" label={t('bias')} hint={t('biasHint')} optional />
      <div className="grid gap-3 md:grid-cols-2">
        <DateField name="calibratedOn" label={t('calibratedDay')} />
        <DateField name="dueOn" label={t('dueOn')} />
      </div>
      <TextField name="certificate" label={t('certificate')} optional code maxLength={80} />
      <div>
        <SubmitButton kind={form.formik.values.asFound === 'failed' ? 'danger' : 'primary'}>{t('recordAction')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}
