'use client';

import { useState } from 'react';
import { decimalFrom } from '@/components/forms/decimal-text';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import { VerdictMark, type Verdict } from '@/components/ui/verdict-mark';
import type { InspectionContent } from '@/services/contracts/inspection-content';
import type { ZoneRow } from './plan-rows';
import type { Draft } from './use-draft';

type Indication = InspectionContent['indications'][number];

const types = ['gas-pore', 'shrinkage', 'inclusion', 'crack', 'cold-shut', 'residual-core'];
const bases = ['as-bled-out', 'wiped-magnified', 'comparator', 'image'];

/** What the rules say of one indication: the worst row that names it. */
export function verdictOf(draft: Draft, id: string): Verdict | undefined {
  const { evaluation } = draft.judgement;
  const row = evaluation?.indications.find((one) => one.id === id);
  if (!evaluation || !row) return undefined;
  if (evaluation.rules.some(({ verdict, indications }) => verdict === 'reject' && indications.includes(id))) return 'reject';
  if (evaluation.unjudged.includes(id)) return 'indeterminate';
  return row.length === null ? 'not-evaluable' : 'accept';
}

/** The next free number for an indication. */
export function nextId(indications: readonly Indication[]): string {
  return String(Math.max(0, ...indications.map(({ id }) => Number(id) || 0)) + 1);
}

function micrometres(text: string): number | undefined {
  const exact = decimalFrom(text);
  return exact === undefined ? undefined : Math.round(Number(exact) * 1000);
}

function EnteredForm({ draft, zones }: { draft: Draft; zones: readonly ZoneRow[] }) {
  const t = useMessages('inspections');
  const [type, setType] = useState('gas-pore');
  const [length, setLength] = useState('');
  const [width, setWidth] = useState('');
  const [zone, setZone] = useState(zones[0]?.id ?? '');
  const [basis, setBasis] = useState('wiped-magnified');
  const [apart, setApart] = useState(true);
  const [long, wide] = [micrometres(length), micrometres(width)];
  const ready = long !== undefined && wide !== undefined && wide > 0 && long >= wide && zone !== '';
  const add = () => {
    const { indications } = draft.content;
    const view = zones.find(({ id }) => id === zone)?.view ?? '';
    draft.change({
      indications: [
        ...indications,
        { id: nextId(indications), type, view, shape: { kind: 'entered', length: long, width: wide, zone, basis, apart } },
      ],
    });
    setLength('');
    setWidth('');
  };
  const choice = (label: string, value: string, set: (value: string) => void, options: readonly string[]) => (
    <label className="flex flex-col gap-1">
      <span>{label}</span>
      <select className="field" value={value} onChange={(event) => set(event.target.value)}>
        {options.map((one) => (
          <option key={one}>{one}</option>
        ))}
      </select>
    </label>
  );
  return (
    <fieldset className="mt-3 border-t border-line pt-3">
      <legend className="font-semibold">{t('addEntered')}</legend>
      <div className="flex flex-wrap items-end gap-3">
        {choice(t('type'), type, setType, types)}
        <label className="flex flex-col gap-1">
          <span>{t('length')}</span>
          <input
            className="field w-24 text-right font-mono"
            inputMode="decimal"
            value={length}
            onChange={(event) => setLength(event.target.value)}
          />
        </label>
        <label className="flex flex-col gap-1">
          <span>{t('width')}</span>
          <input
            className="field w-24 text-right font-mono"
            inputMode="decimal"
            value={width}
            onChange={(event) => setWidth(event.target.value)}
          />
        </label>
        {choice(
          t('zone'),
          zone,
          setZone,
          zones.map(({ id }) => id),
        )}
        {choice(t('basis'), basis, setBasis, bases)}
        <label className="flex min-h-12 items-center gap-2">
          <input type="checkbox" checked={apart} onChange={(event) => setApart(event.target.checked)} />
          {t('apart')}
        </label>
        <Button disabled={!ready} onClick={add}>
          {t('add')}
        </Button>
      </div>
    </fieldset>
  );
}

/** Every indication with size, zone and verdict by shape and word. */
export function IndicationsPanel({ draft, zones, readOnly }: { draft: Draft; zones: readonly ZoneRow[]; readOnly: boolean }) {
  const t = useMessages('inspections');
  const { indications } = draft.content;
  const put = (id: string, next: Partial<Indication>) =>
    draft.change({ indications: indications.map((one) => (one.id === id ? { ...one, ...next } : one)) });
  return (
    <Panel title={t('indications')}>
      <ul className="flex flex-col gap-2">
        {indications.map((one) => {
          const row = draft.judgement.evaluation?.indications.find(({ id }) => id === one.id);
          const verdict = verdictOf(draft, one.id);
          const relevant = one.relevant as { is: boolean; reason?: string } | null | undefined;
          return (
            <li key={one.id} className="flex flex-wrap items-center gap-3 border-b border-line pb-2">
              <span className="font-mono font-semibold">{one.id}</span>
              <select
                className="field"
                aria-label={`${t('type')} ${one.id}`}
                disabled={readOnly}
                value={one.type}
                onChange={(event) => put(one.id, { type: event.target.value })}
              >
                {types.map((type) => (
                  <option key={type}>{type}</option>
                ))}
              </select>
              <span className="font-mono tabular-nums">{row?.length ? `${row.length} × ${row.width ?? ''} mm` : '–'}</span>
              <span>{row?.zones.join(', ')}</span>
              {verdict ? <VerdictMark verdict={verdict} /> : null}
              <input
                className="field"
                aria-label={`${t('notRelevant')} ${one.id}`}
                placeholder={t('notRelevant')}
                readOnly={readOnly}
                value={relevant?.reason ?? ''}
                onChange={(event) =>
                  put(one.id, { relevant: event.target.value.trim() === '' ? null : { is: false, reason: event.target.value } })
                }
              />
              {readOnly ? null : (
                <Button onClick={() => draft.change({ indications: indications.filter(({ id }) => id !== one.id) })}>
                  {t('remove')}
                </Button>
              )}
            </li>
          );
        })}
      </ul>
      {readOnly || zones.length === 0 ? null : <EnteredForm draft={draft} zones={zones} />}
    </Panel>
  );
}
