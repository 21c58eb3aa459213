'use client';

import { useMessages } from '@/components/theme/use-messages';
import { useMethodWords } from '@/components/personnel/method-words';
import { Panel } from '@/components/ui/panel';
import { method } from '@/services/contracts/common';
import { keyOfRequirement } from '@/services/contracts/plan-faults';
import { textOfValue, type Option } from './entry-values';
import { PlanFault, PlanField } from './plan-field';
import { usePlanEditing } from './plan-editing';
import { AddRow, RowButtons } from './row-buttons';
import { RowsTable } from './rows-table';

/** What an operation can refer to, as it is named in the plan now. */
function useNames(): (list: string, key: string) => Option[] {
  const { rows, at } = usePlanEditing();
  return (list, key) =>
    rows(list).flatMap((_, place) => {
      const value = textOfValue(at(`${list}.${String(place)}.${key}`));
      const title = textOfValue(at(`${list}.${String(place)}.title`));
      return value === '' ? [] : [{ value, text: title === '' ? value : `${value} ${title}` }];
    });
}

function Operation({ path, place }: { readonly path: string; readonly place: number }) {
  const t = useMessages('plans');
  const methodWords = useMethodWords();
  const names = useNames();
  const { at, set, readOnly } = usePlanEditing();
  const name = `${textOfValue(at(`${path}.operation`))} ${textOfValue(at(`${path}.title`))}`.trim() || String(place + 1);
  const block = at(`${path}.blockCheck`) !== undefined;
  const roles = (['radiograph', 'photograph', 'reading-file', 'document'] as const).map((value) => ({
    value,
    text: t(`files.${value}`),
  }));
  return (
    <Panel level={3} title={name} actions={<RowButtons path="route" place={place} name={name} />}>
      <div className="flex flex-col gap-3">
        <div className="grid gap-x-4 gap-y-2 sm:grid-cols-2 lg:grid-cols-5">
          <PlanField path={`${path}.operation`} label={t('operation')} kind="text" />
          <PlanField path={`${path}.title`} label={t('title')} kind="text" />
          <PlanField
            path={`${path}.method`}
            label={t('method')}
            kind="choice"
            options={method.options.map((value) => ({ value, text: methodWords(value) }))}
          />
          <PlanField path={`${path}.technique`} label={t('technique')} kind="text" />
          <PlanField path={`${path}.key`} label={t('key')} kind="text" />
        </div>
        <PlanField
          path={`${path}.characteristics`}
          label={t('characteristics')}
          kind="marks"
          options={names('criteria.characteristics', 'number')}
        />
        <PlanField
          path={`${path}.attributes`}
          label={t('attributes')}
          kind="marks"
          options={names('criteria.attributes', 'number')}
        />
        <PlanField path={`${path}.process`} label={t('process')} kind="marks" options={names('criteria.process', 'number')} />
        <div className="grid gap-3 lg:grid-cols-2">
          <PlanField
            path={`${path}.indicationRules`}
            label={t('ruleSets')}
            kind="marks"
            options={names('criteria.indicationRules', 'id')}
          />
          <PlanField path={`${path}.views`} label={t('views')} kind="marks" options={names('views', 'name')} />
        </div>
        <div className="grid gap-x-4 gap-y-2 sm:grid-cols-2">
          <PlanField path={`${path}.checks`} label={t('checks')} kind="words" />
          <PlanField path={`${path}.indicator.required`} label={t('indicator')} kind="text" />
        </div>
        <RowsTable
          path={`${path}.evidence`}
          caption={t('filesOf', { name })}
          nameKey="role"
          addLabel={t('addFile')}
          fresh={{ role: 'photograph', minimum: 1 }}
          columns={[
            { key: 'role', title: t('fileRole'), kind: 'choice', options: roles, width: 'w-56' },
            { key: 'minimum', title: t('fileMinimum'), kind: 'whole', width: 'w-32' },
          ]}
        />
        {readOnly ? null : (
          <label className="flex min-h-10 items-center gap-2">
            <input
              type="checkbox"
              className="size-5"
              checked={block}
              onChange={(event) =>
                set(
                  `${path}.blockCheck`,
                  event.target.checked ? { unit: 'mm', steps: [{ nominal: '', tolerance: '' }] } : undefined,
                )
              }
            />
            {t('blockCheck')}
          </label>
        )}
        {block ? (
          <RowsTable
            path={`${path}.blockCheck.steps`}
            caption={t('blockSteps')}
            nameKey="nominal"
            addLabel={t('addStep')}
            fresh={{ nominal: '', tolerance: '' }}
            columns={[
              { key: 'nominal', title: t('stepNominal'), kind: 'decimal', width: 'w-40' },
              { key: 'tolerance', title: t('stepTolerance'), kind: 'decimal', width: 'w-40' },
            ]}
          />
        ) : null}
      </div>
    </Panel>
  );
}

/** The route in its order, the rework the plan permits, and which parts the issue is for. */
export function RouteSection() {
  const t = useMessages('plans');
  const { rows, content, faultAt, at, set, readOnly } = usePlanEditing();
  const keys = content.route.map((row) => ({ value: keyOfRequirement(row), text: `${row.operation} ${row.title}`.trim() }));
  const kinds = (['serial', 'lot', 'date'] as const).map((value) => ({ value, text: t(`effectivityKinds.${value}`) }));
  const limited = at('effectivity') !== null && at('effectivity') !== undefined;
  return (
    <div className="flex flex-col gap-4">
      <PlanFault text={faultAt('route')} />
      {rows('route').map((_, place) => (
        <Operation key={place} place={place} path={`route.${String(place)}`} />
      ))}
      <div>
        <AddRow path="route" row={freshOperation} label={t('addOperation')} />
      </div>
      <Panel title={t('rework')} subtitle={t('reworkHint')}>
        <RowsTable
          path="rework"
          caption={t('rework')}
          nameKey="kind"
          addLabel={t('addRework')}
          fresh={{ kind: '', title: '', inspectorMayOrder: false, mostCycles: 1, reopens: [] }}
          columns={[
            { key: 'kind', title: t('reworkKind'), kind: 'text', width: 'w-32' },
            { key: 'title', title: t('title'), kind: 'text' },
            { key: 'inspectorMayOrder', title: t('inspectorMayOrder'), kind: 'yes' },
            { key: 'mostCycles', title: t('mostCycles'), kind: 'whole', width: 'w-24' },
            { key: 'reopens', title: t('reopens'), kind: 'marks', options: keys },
          ]}
        />
      </Panel>
      <Panel title={t('effectivity')} subtitle={t('effectivityHint')}>
        {readOnly ? null : (
          <label className="flex min-h-10 items-center gap-2">
            <input
              type="checkbox"
              className="size-5"
              checked={limited}
              onChange={(event) => set('effectivity', event.target.checked ? { kind: 'serial', from: '', to: null } : null)}
            />
            {t('limited')}
          </label>
        )}
        {limited ? (
          <div className="grid gap-4 sm:grid-cols-3">
            <PlanField path="effectivity.kind" label={t('effectivityKind')} kind="choice" options={kinds} />
            <PlanField path="effectivity.from" label={t('from')} kind="text" />
            <PlanField path="effectivity.to" label={t('to')} kind="text" />
          </div>
        ) : (
          <p>{t('everyPart')}</p>
        )}
      </Panel>
    </div>
  );
}

const freshOperation = {
  operation: '',
  title: '',
  method: 'visual',
  views: [],
  characteristics: [],
  attributes: [],
  process: [],
  indicationRules: [],
  evidence: [],
  checks: [],
};
