'use client';

import { useMessages } from '@/components/theme/use-messages';
import { textOfValue } from './entry-values';
import { PlanFault, PlanField } from './plan-field';
import { usePlanEditing } from './plan-editing';

/** The decision rules of the engine as one choice, each with the one number it takes. */
const decisions = {
  simple: { value: { rule: 'simple' }, number: 'capability' },
  'guarded-binary': { value: { rule: 'guarded', form: 'binary', g: '1' }, number: 'g' },
  'guarded-non-binary': { value: { rule: 'guarded', form: 'non-binary', g: '1' }, number: 'g' },
  risk: { value: { rule: 'risk', r: '0.025' }, number: 'r' },
} as const;
type DecisionName = keyof typeof decisions;
const names = Object.keys(decisions) as DecisionName[];

function nameOf(rule: string, form: string): DecisionName | undefined {
  return names.find((name) => name === rule || name === `${rule}-${form}`);
}

/** How a reading near its limit is decided, and the number that the rule takes. */
export function DecisionField({ path, name }: { readonly path: string; readonly name: string }) {
  const t = useMessages('plans');
  const { at, set, faultAt, readOnly } = usePlanEditing();
  const chosen = nameOf(textOfValue(at(`${path}.rule`)), textOfValue(at(`${path}.form`)));
  const number = chosen === undefined ? undefined : decisions[chosen].number;
  return (
    <div className="flex flex-wrap items-start gap-1">
      {readOnly ? (
        <span>{chosen === undefined ? '–' : t(`decisions.${chosen}`)}</span>
      ) : (
        <label className="min-w-40 flex-1">
          <span className="sr-only">{t('decisionOf', { name })}</span>
          <select
            data-path={path}
            className="field"
            value={chosen ?? ''}
            onChange={(event) => {
              const next = names.find((one) => one === event.target.value);
              set(path, next === undefined ? undefined : decisions[next].value);
            }}
          >
            <option value="">–</option>
            {names.map((one) => (
              <option key={one} value={one}>
                {t(`decisions.${one}`)}
              </option>
            ))}
          </select>
          <PlanFault text={faultAt(path) ?? faultAt(`${path}.rule`) ?? faultAt(`${path}.form`)} />
        </label>
      )}
      {number === undefined ? null : (
        <div className="w-20">
          <PlanField quiet kind="decimal" path={`${path}.${number}`} label={t('decisionNumber', { number, name })} />
        </div>
      )}
    </div>
  );
}
