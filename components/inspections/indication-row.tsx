'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { VerdictMark, type Verdict } from '@/components/ui/verdict-mark';
import type { EvaluationAnswer } from '@/services/contracts/evaluate';
import { ChoiceField } from './choice-field';
import { useSizeWords, useTypeWords, type Indication } from './indication-words';

export interface IndicationRowProps {
  readonly indication: Indication;
  readonly judged: EvaluationAnswer['indications'][number] | undefined;
  readonly verdict: Verdict | undefined;
  readonly faults: readonly string[];
  readonly types: readonly string[];
  /** Unit of the plan's sizes. */
  readonly unit: string;
  readonly selected: boolean;
  readonly readOnly: boolean;
  readonly onSelect: () => void;
  readonly onChange: (next: Partial<Indication>) => void;
  readonly onRemove: () => void;
}

interface Relevance {
  readonly is: boolean;
  readonly reason?: string;
}

/** One indication: number, type, size, place, verdict by shape and word, and why it is not relevant where it is not. */
export function IndicationRow(props: IndicationRowProps) {
  const t = useMessages('inspections');
  const { indication, judged, verdict, faults, types, unit, selected, readOnly, onSelect, onChange, onRemove } = props;
  const { id, type, view } = indication;
  const typeWords = useTypeWords();
  const sizeWords = useSizeWords(unit);
  const relevance = indication.relevant as Relevance | null | undefined;
  const relevant = relevance?.is !== false;
  return (
    <li className={`border-b border-line py-1.5 last:border-b-0 ${selected ? 'border-s-4 border-s-accent ps-2' : ''}`}>
      <div className="flex flex-wrap items-center gap-x-3 gap-y-1">
        <Button aria-pressed={selected} aria-label={t('indication', { id })} onClick={onSelect} className="font-mono">
          {id}
        </Button>
        <ChoiceField
          hideLabel
          label={t('typeOf', { id })}
          disabled={readOnly}
          value={type}
          onChoose={(next) => onChange({ type: next })}
          options={[...new Set([...types, type])].map((value) => ({ value, text: typeWords(value) }))}
        />
        <span className="font-mono tabular-nums">{sizeWords(judged)}</span>
        <span>
          {view} · {judged && judged.zones.length > 0 ? t('inZone', { zone: judged.zones.join(', ') }) : t('noZone')}
        </span>
        {verdict ? <VerdictMark verdict={verdict} /> : <span className="text-ink-soft">{t('notJudged')}</span>}
        {readOnly ? null : (
          <Button kind="bare" className="ms-auto" aria-label={t('removeOf', { id })} onClick={onRemove}>
            {t('remove')}
          </Button>
        )}
      </div>
      <div className="flex flex-wrap items-center gap-3">
        <label className="flex min-h-12 items-center gap-2">
          <input
            type="checkbox"
            className="size-5"
            disabled={readOnly}
            checked={relevant}
            onChange={(event) => onChange({ relevant: event.target.checked ? null : { is: false, reason: '' } })}
          />
          {t('relevantOf', { id })}
        </label>
        {relevant ? null : (
          <input
            className="field w-auto flex-1"
            aria-label={t('notRelevant', { id })}
            placeholder={t('notRelevant', { id })}
            maxLength={400}
            readOnly={readOnly}
            value={relevance?.reason ?? ''}
            onChange={(event) => onChange({ relevant: { is: false, reason: event.target.value } })}
          />
        )}
      </div>
      {faults.map((message) => (
        <p key={message} className="text-sm font-semibold text-reject">
          {message}
        </p>
      ))}
    </li>
  );
}
