'use client';

import { TimeField } from '@/components/inspections/time-field';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import type { ProcessRow } from '@/services/contracts/baskets';
import type { InspectionContent } from '@/services/contracts/inspection-content';
import { useWindowWords } from './window-words';

type Acts = InspectionContent['acts'];
type Process = InspectionContent['process'];
type Act = Acts[number];

export interface SetUpValues {
  readonly process: Process;
  readonly acts: Acts;
}

export interface SetUpAsked {
  readonly windows: readonly ProcessRow[];
  readonly neededActs: readonly { readonly kind: string; readonly equipment: boolean }[];
  readonly indicator: string | null;
  readonly equipment: readonly { readonly id: string; readonly number: string; readonly title: string }[];
  readonly people: readonly { readonly id: string; readonly name: string }[];
}

interface FieldsProps {
  readonly asked: SetUpAsked;
  readonly values: SetUpValues;
  readonly onChange: (values: SetUpValues) => void;
  /** The values come from a run. */
  readonly byRun: boolean;
}

function actOf(acts: Acts, kind: Act['kind']): Act {
  return acts.find((act) => act.kind === kind) ?? { kind, person: null, at: null, equipment: [], values: {} };
}

function withAct(values: SetUpValues, act: Act): SetUpValues {
  return { ...values, acts: [...values.acts.filter(({ kind }) => kind !== act.kind), act] };
}

function ProcessFields({ asked, values, onChange }: Omit<FieldsProps, 'byRun'>) {
  const t = useMessages('baskets');
  const windowWords = useWindowWords();
  if (asked.windows.length === 0) return null;
  const valueOf = (number: string) => values.process.find((one) => one.number === number)?.value ?? '';
  const put = ({ number, unit }: ProcessRow, value: string) =>
    onChange({
      ...values,
      process: [...values.process.filter((one) => one.number !== number), ...(value === '' ? [] : [{ number, value, unit }])],
    });
  return (
    <fieldset className="grid gap-x-4 gap-y-3 sm:grid-cols-2">
      <legend className="mb-1 font-semibold">{t('process')}</legend>
      {asked.windows.map((row) => (
        <label key={row.number} className="flex flex-col gap-0.5">
          <span>{row.title}</span>
          <input
            className="field max-w-48 text-right font-mono tabular-nums"
            inputMode="decimal"
            autoComplete="off"
            value={valueOf(row.number)}
            onChange={(event) => put(row, event.target.value)}
          />
          <span className="text-sm text-ink-soft">{windowWords(row)}</span>
        </label>
      ))}
    </fieldset>
  );
}

/** Who and when of an act before the judging one: the judging act is the scan's. */
function EarlierAct({ asked, values, onChange, kind }: Omit<FieldsProps, 'byRun'> & { kind: 'processed' | 'exposed' }) {
  const t = useMessages('baskets');
  const act = actOf(values.acts, kind);
  return (
    <div className="grid gap-x-4 gap-y-3 sm:grid-cols-2">
      <label className="flex flex-col gap-0.5">
        <span>{t(kind)}</span>
        <select
          className="field"
          value={act.person ?? ''}
          onChange={(event) => onChange(withAct(values, { ...act, person: event.target.value || null }))}
        >
          <option value="">{t('choose')}</option>
          {asked.people.map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
        </select>
      </label>
      <TimeField
        label={t(`${kind}At`)}
        at={act.at}
        readOnly={false}
        wrong={t('wrongTime')}
        onChange={(at) => onChange(withAct(values, { ...act, at }))}
      />
    </div>
  );
}

function EquipmentOf({ asked, values, onChange, kind }: Omit<FieldsProps, 'byRun'> & { kind: Act['kind'] }) {
  const t = useMessages('baskets');
  const act = actOf(values.acts, kind);
  const word = kind === 'processed' || kind === 'exposed' || kind === 'measured' ? kind : 'evaluated';
  return (
    <fieldset className="flex flex-wrap gap-2">
      <legend className="mb-1">{t('equipmentFor', { act: t(`acts.${word}`) })}</legend>
      {asked.equipment.map(({ id, number, title }) => {
        const chosen = act.equipment.includes(id);
        const equipment = chosen ? act.equipment.filter((one) => one !== id) : [...act.equipment, id];
        return (
          <Button
            key={id}
            size="capture"
            aria-pressed={chosen}
            glyph={chosen ? 'accept' : 'ring'}
            kind="quiet"
            title={title}
            onClick={() => onChange(withAct(values, { ...act, equipment }))}
          >
            <span className="font-mono">{number}</span>
          </Button>
        );
      })}
    </fieldset>
  );
}

function IndicatorSeen({ asked, values, onChange }: Omit<FieldsProps, 'byRun'>) {
  const t = useMessages('baskets');
  if (asked.indicator === null) return null;
  const act = actOf(values.acts, 'exposed');
  const seen = act.values.indicatorSeen === asked.indicator;
  const put = (now: boolean) =>
    onChange(withAct(values, { ...act, values: now ? { ...act.values, indicatorSeen: asked.indicator ?? '' } : {} }));
  return (
    <label className="flex min-h-capture items-center gap-3">
      <input type="checkbox" className="size-6" checked={seen} onChange={(event) => put(event.target.checked)} />
      {t('indicator', { required: asked.indicator })}
    </label>
  );
}

/** What is entered once for all parts: process values, who processed and when, with what it is judged. */
export function SetUpFields({ asked, values, onChange, byRun }: FieldsProps) {
  const common = { asked, values, onChange };
  const earlier = asked.neededActs.flatMap(({ kind }) => (kind === 'processed' || kind === 'exposed' ? [kind] : [])) as (
    'processed' | 'exposed'
  )[];
  const equipped = asked.neededActs.filter(({ equipment }) => equipment).map(({ kind }) => kind as Act['kind']);
  return (
    <>
      {byRun ? null : <ProcessFields {...common} />}
      {earlier.map((kind) => (
        <EarlierAct key={kind} kind={kind} {...common} />
      ))}
      {equipped.map((kind) => (
        <EquipmentOf key={kind} kind={kind} {...common} />
      ))}
      <IndicatorSeen {...common} />
    </>
  );
}
