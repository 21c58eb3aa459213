'use client';

import { object, string } from 'yup';
import { FormStatus } from '@/components/forms/form-status';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { SelectField } from '@/components/forms/select-field';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextField } from '@/components/forms/text-field';
import { useMethodWords } from '@/components/personnel/method-words';
import { useMessages } from '@/components/theme/use-messages';
import { method } from '@/services/contracts/common';
import type { Technique } from '@/services/contracts/techniques';
import { RowList } from './row-list';
import { bodyOf, emptyRows, valuesOf, type TechniqueValues } from './technique-values';

function ContentFields({ content }: { content: TechniqueValues['content'] }) {
  const t = useMessages('techniques');
  const kinds = (['opening', 'bracketing'] as const).map((value) => ({ value, label: t(`kinds.${value}`) }));
  const limits = [
    { name: 'lower', title: t('lower'), span: 1, kind: 'decimal' },
    { name: 'upper', title: t('upper'), span: 1, kind: 'decimal' },
  ] as const;
  const unit = { name: 'unit', title: t('unit'), span: 1 } as const;
  return (
    <>
      <RowList
        path="content.parameters"
        title={t('parameters')}
        hint={t('parametersHint')}
        rows={content.parameters}
        emptyRow={emptyRows.parameters}
        columns={[
          { name: 'name', title: t('parameter'), span: 4 },
          { name: 'value', title: t('value'), span: 4 },
          unit,
          { name: 'essential', title: t('essential'), span: 2, kind: 'check' },
        ]}
      />
      <RowList
        path="content.windows"
        title={t('windows')}
        rows={content.windows}
        emptyRow={emptyRows.windows}
        columns={[
          { name: 'title', title: t('window'), span: 6 },
          { ...unit, span: 1 },
          { ...limits[0], span: 2 },
          { ...limits[1], span: 2 },
        ]}
      />
      <RowList
        path="content.views"
        title={t('views')}
        rows={content.views}
        emptyRow={emptyRows.views}
        columns={[{ name: 'name', title: t('view'), span: 11 }]}
      />
      <RowList
        path="content.checks"
        title={t('checks')}
        rows={content.checks}
        emptyRow={emptyRows.checks}
        columns={[
          { name: 'scope', title: t('scope'), span: 2 },
          { name: 'title', title: t('check'), span: 3 },
          { name: 'kind', title: t('kind'), span: 2, kind: 'select', options: kinds },
          { name: 'validHours', title: t('hours'), span: 1, kind: 'decimal' },
          unit,
          ...limits,
        ]}
      />
      <TextField name="indicator" label={t('indicator')} optional maxLength={60} />
    </>
  );
}

/** Writes a technique: a new one, the next issue of one, or the draft that is there. */
export function TechniqueForm({
  from,
  draft,
  onSaved,
}: {
  /** What the form begins with. */
  from?: Technique | undefined;
  /** The draft that is changed; a new issue is started without one. */
  draft?: Technique | undefined;
  onSaved: (technique: Technique) => void;
}) {
  const t = useMessages('techniques');
  const methodWords = useMethodWords();
  const needed = string().trim().required(t('needed'));
  const form = useProblemForm<TechniqueValues>({
    initialValues: valuesOf(from),
    validationSchema: object({ number: needed, method: needed, title: needed, standard: needed }),
    onSubmit: async (values) => {
      const { number, method: chosen } = values;
      onSaved(
        draft
          ? await sendJson<Technique>(`/api/techniques/${draft.id}`, {
              ...{ method: 'PUT', body: bodyOf(values) },
              headers: { 'if-match': `"${String(draft.version)}"` },
            })
          : await sendJson<Technique>('/api/techniques', { body: { number, method: chosen, ...bodyOf(values) } }),
      );
    },
  });
  return (
    <ProblemForm form={form} label={t('technique')}>
      <FormStatus />
      <div className="grid gap-3 md:grid-cols-2">
        <TextField name="number" label={t('number')} code maxLength={40} disabled={from !== undefined} />
        <SelectField
          name="method"
          label={t('method')}
          disabled={from !== undefined}
          options={method.options.map((value) => ({ value, label: methodWords(value) }))}
        />
      </div>
      <TextField name="title" label={t('name')} maxLength={200} />
      <div className="grid gap-3 md:grid-cols-2">
        <TextField name="standard" label={t('standard')} maxLength={200} />
        <TextField name="customerApproval" label={t('customerApproval')} optional maxLength={120} />
      </div>
      <ContentFields content={form.formik.values.content} />
      <div>
        <SubmitButton>{t('save')}</SubmitButton>
      </div>
    </ProblemForm>
  );
}
