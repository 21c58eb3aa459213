'use client';

import { useMessages } from '@/components/theme/use-messages';
import { useMethodWords } from '@/components/personnel/method-words';
import { Panel } from '@/components/ui/panel';
import { method } from '@/services/contracts/common';
import { textOfValue } from './entry-values';
import { PlanFault, PlanField } from './plan-field';
import { usePlanEditing } from './plan-editing';
import { AddRow, RowButtons } from './row-buttons';
import { RowsTable } from './rows-table';
import { ruleChoices, ruleFields, ruleKinds, type RuleKind } from './rule-fields';

/** A choice of kind puts a rule without the entries of the kind before. */
function KindField({ path, name }: { readonly path: string; readonly name: string }) {
  const t = useMessages('plans');
  const { at, set, faultAt, readOnly } = usePlanEditing();
  const kind = textOfValue(at(`${path}.kind`));
  if (readOnly) return <strong>{kind in ruleFields ? t(`ruleKinds.${kind as RuleKind}`) : kind}</strong>;
  return (
    <label className="min-w-56">
      <span className="sr-only">{t('kindOf', { name })}</span>
      <select
        data-path={`${path}.kind`}
        className="field"
        value={kind}
        onChange={(event) =>
          set(path, event.target.value === 'size-bands' ? { kind: 'size-bands', bands: [] } : { kind: event.target.value })
        }
      >
        {kind in ruleFields ? null : <option value={kind}>{kind === '' ? '–' : kind}</option>}
        {ruleKinds.map((one) => (
          <option key={one} value={one}>
            {t(`ruleKinds.${one}`)}
          </option>
        ))}
      </select>
      <PlanFault text={faultAt(`${path}.kind`)} />
    </label>
  );
}

function Rule({ path, name }: { readonly path: string; readonly name: string }) {
  const t = useMessages('plans');
  const { at, faultAt } = usePlanEditing();
  const kind = textOfValue(at(`${path}.kind`));
  const fields = kind in ruleFields ? ruleFields[kind as RuleKind] : [];
  const choices = (key: string) =>
    key in ruleChoices
      ? ruleChoices[key as keyof typeof ruleChoices].map((value) => ({ value, text: t(`choices.${value}`) }))
      : [];
  return (
    <div className="flex min-w-0 flex-1 flex-col gap-2">
      <KindField path={path} name={name} />
      <PlanFault text={faultAt(path)} />
      <div className="grid gap-x-3 gap-y-1 sm:grid-cols-2 lg:grid-cols-4">
        {fields.map(({ key, word, kind: entry }) => (
          <PlanField key={key} path={`${path}.${key}`} label={t(`ruleFields.${word}`)} kind={entry} options={choices(key)} />
        ))}
      </div>
      {kind === 'size-bands' ? (
        <RowsTable
          path={`${path}.bands`}
          caption={t('bandsOf', { name })}
          nameKey="to"
          addLabel={t('addBand')}
          fresh={{ to: '', count: 0 }}
          columns={[
            { key: 'to', title: t('bandTo'), kind: 'decimal', width: 'w-32' },
            { key: 'count', title: t('bandCount'), kind: 'whole', width: 'w-40' },
          ]}
        />
      ) : null}
    </div>
  );
}

function RuleSet({ path, place }: { readonly path: string; readonly place: number }) {
  const t = useMessages('plans');
  const methodWords = useMethodWords();
  const { at, rows } = usePlanEditing();
  const name = textOfValue(at(`${path}.id`)) || String(place + 1);
  const zones = rows('criteria.zones').map((_, zone) => textOfValue(at(`criteria.zones.${String(zone)}.id`)));
  return (
    <Panel
      level={3}
      title={t('ruleSet', { name })}
      actions={<RowButtons path="criteria.indicationRules" place={place} name={t('ruleSet', { name })} />}
    >
      <div className="mb-4 grid gap-x-4 gap-y-2 sm:grid-cols-2 lg:grid-cols-4">
        <PlanField path={`${path}.id`} label={t('ruleSetId')} kind="text" />
        <PlanField path={`${path}.clause`} label={t('clause')} kind="text" />
        <PlanField path={`${path}.types`} label={t('setTypes')} kind="words" />
        <PlanField path={`${path}.recordable`} label={t('recordable')} kind="decimal" />
        <PlanField path={`${path}.merge.within`} label={t('mergeWithin')} kind="decimal" />
        <PlanField path={`${path}.merge.factor`} label={t('mergeFactor')} kind="decimal" />
        <PlanField
          path={`${path}.merge.of`}
          label={t('mergeOf')}
          kind="choice"
          options={(['larger', 'smaller'] as const).map((value) => ({ value, text: t(`choices.${value}`) }))}
        />
        <PlanField path={`${path}.cracksAllowed`} label={t('cracksAllowed')} kind="text" />
      </div>
      <div className="mb-4 grid gap-2 lg:grid-cols-2">
        <PlanField
          path={`${path}.zones`}
          label={t('zones')}
          kind="marks"
          options={zones.filter((one) => one !== '').map((value) => ({ value, text: value }))}
        />
        <PlanField
          path={`${path}.methods`}
          label={t('methods')}
          kind="marks"
          options={method.options.map((value) => ({ value, text: methodWords(value) }))}
        />
      </div>
      <ol className="flex flex-col gap-3">
        {rows(`${path}.rules`).map((_, rule) => (
          <li key={rule} className="flex flex-wrap items-start gap-3 border-t border-line pt-3">
            <Rule path={`${path}.rules.${String(rule)}`} name={`${name}.${String(rule + 1)}`} />
            <RowButtons path={`${path}.rules`} place={rule} name={`${name}.${String(rule + 1)}`} />
          </li>
        ))}
      </ol>
      <div className="mt-3">
        <AddRow path={`${path}.rules`} row={{ kind: 'max-size' }} label={t('addRule')} />
      </div>
    </Panel>
  );
}

/** What is linear, and the sets of indication rules as the drawing's notes give them. */
export function RulesSection() {
  const t = useMessages('plans');
  const { rows, faultAt } = usePlanEditing();
  const choice = <Value extends 'mm' | 'in'>(value: Value) => ({ value, text: value });
  return (
    <div className="flex flex-col gap-4">
      <Panel title={t('sizes')} subtitle={t('sizesHint')}>
        <div className="grid gap-4 sm:grid-cols-3">
          <PlanField path="criteria.lengthUnit" label={t('lengthUnit')} kind="choice" options={[choice('mm'), choice('in')]} />
          <PlanField path="criteria.linear.ratio" label={t('linearRatio')} kind="decimal" />
          <PlanField
            path="criteria.linear.at"
            label={t('linearAt')}
            kind="choice"
            options={(['above', 'at-or-above'] as const).map((value) => ({ value, text: t(`choices.${value}`) }))}
          />
        </div>
        <PlanFault text={faultAt('criteria.linear')} />
      </Panel>
      {rows('criteria.indicationRules').map((_, place) => (
        <RuleSet key={place} place={place} path={`criteria.indicationRules.${String(place)}`} />
      ))}
      <div>
        <AddRow
          path="criteria.indicationRules"
          row={{ id: '', zones: [], methods: [], types: ['*'], rules: [] }}
          label={t('addRuleSet')}
        />
      </div>
    </div>
  );
}
