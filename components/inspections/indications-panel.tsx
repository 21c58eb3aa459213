'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Panel } from '@/components/ui/panel';
import { ChoiceField } from './choice-field';
import { EnteredIndication } from './entered-indication';
import { useTypeWords, verdictOf, type Indication } from './indication-words';
import { IndicationRow } from './indication-row';
import type { ZoneRow } from './plan-rows';
import { RulesList } from './rules-list';
import type { Draft } from './use-draft';

export interface IndicationsPanelProps {
  readonly draft: Draft;
  readonly zones: readonly ZoneRow[];
  readonly types: readonly string[];
  readonly unit: string;
  /** Absent where nothing can be marked. */
  readonly nextType?: string;
  readonly onNextType: (type: string) => void;
  readonly selectedId: string | null;
  readonly onSelect: (id: string | null) => void;
  readonly readOnly: boolean;
}

/** Every indication in the order it was found, and every rule of the plan with its verdict. */
export function IndicationsPanel(props: IndicationsPanelProps) {
  const { draft, zones, types, unit, nextType, onNextType, selectedId, onSelect, readOnly } = props;
  const t = useMessages('inspections');
  const typeWords = useTypeWords();
  const { indications } = draft.content;
  const { evaluation, faults } = draft.judgement;
  const put = (id: string, next: Partial<Indication>) =>
    draft.change({ indications: indications.map((one) => (one.id === id ? { ...one, ...next } : one)) });
  return (
    <Panel
      title={t('indications')}
      subtitle={t('indicationCount', { count: indications.length })}
      actions={
        nextType === undefined ? undefined : (
          <ChoiceField
            label={t('nextType')}
            hideLabel
            value={nextType}
            options={types.map((value) => ({ value, text: t('nextTypeIs', { type: typeWords(value) }) }))}
            onChoose={onNextType}
          />
        )
      }
    >
      <ul className="-my-2">
        {indications.map((one, place) => (
          <IndicationRow
            key={one.id}
            indication={one}
            judged={evaluation?.indications.find(({ id }) => id === one.id)}
            verdict={verdictOf(evaluation, one.id)}
            faults={faults.filter(({ path }) => path.startsWith(`indications.${String(place)}.`)).map(({ message }) => message)}
            types={types}
            unit={unit}
            selected={one.id === selectedId}
            readOnly={readOnly}
            onSelect={() => onSelect(one.id === selectedId ? null : one.id)}
            onChange={(next) => put(one.id, next)}
            onRemove={() => draft.change({ indications: indications.filter(({ id }) => id !== one.id) })}
          />
        ))}
      </ul>
      {readOnly || zones.length === 0 ? null : <EnteredIndication draft={draft} zones={zones} types={types} />}
      {evaluation && evaluation.rules.length > 0 ? <RulesList rules={evaluation.rules} /> : null}
    </Panel>
  );
}
