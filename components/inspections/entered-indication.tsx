'use client';

import { useState, type FormEvent } from 'react';
import { decimalFrom } from '@/components/forms/decimal-text';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { ChoiceField } from './choice-field';
import { nextId, sizeBases, useTypeWords } from './indication-words';
import type { ZoneRow } from './plan-rows';
import type { Draft } from './use-draft';

export interface EnteredIndicationProps {
  readonly draft: Draft;
  readonly zones: readonly ZoneRow[];
  readonly types: readonly string[];
}

/** Whole micrometres of a length in millimetres; undefined for what is no length. */
function micrometres(text: string): number | undefined {
  const exact = decimalFrom(text);
  const um = exact === undefined ? 0 : Math.round(Number(exact) * 1000);
  return um >= 1 && um <= 1e8 ? um : undefined;
}

function LengthField({ label, value, onType }: { label: string; value: string; onType: (text: string) => void }) {
  return (
    <label className="flex flex-col gap-0.5">
      <span>{label}</span>
      <input
        className="field max-w-24 text-right font-mono"
        inputMode="decimal"
        autoComplete="off"
        value={value}
        onChange={(event) => onType(event.target.value)}
      />
    </label>
  );
}

/** An indication that no picture shows: sizes, zone, and how they were taken. The longer of the two counts as the length. */
export function EnteredIndication({ draft, zones, types }: EnteredIndicationProps) {
  const t = useMessages('inspections');
  const typeWords = useTypeWords();
  const [type, setType] = useState(types[0] ?? 'gas-pore');
  const [length, setLength] = useState('');
  const [width, setWidth] = useState('');
  const [zone, setZone] = useState(zones[0]?.id ?? '');
  const [basis, setBasis] = useState<string>('wiped-magnified');
  const [apart, setApart] = useState(true);
  const [one, other] = [micrometres(length), micrometres(width)];
  const add = (event: FormEvent) => {
    event.preventDefault();
    if (one === undefined || other === undefined) return;
    const { indications } = draft.content;
    const view = zones.find(({ id }) => id === zone)?.view ?? '';
    const shape = { kind: 'entered', length: Math.max(one, other), width: Math.min(one, other), zone, basis, apart };
    draft.change({ indications: [...indications, { id: nextId(indications), type, view, shape }] });
    setLength('');
    setWidth('');
  };
  return (
    <form onSubmit={add} aria-label={t('addEntered')} className="mt-3 border-t border-line pt-2">
      <p className="font-semibold">{t('addEntered')}</p>
      <div className="flex flex-wrap items-end gap-x-3 gap-y-2">
        <ChoiceField
          label={t('type')}
          value={type}
          onChoose={setType}
          options={types.map((value) => ({ value, text: typeWords(value) }))}
        />
        <LengthField label={t('length')} value={length} onType={setLength} />
        <LengthField label={t('width')} value={width} onType={setWidth} />
        <ChoiceField
          label={t('zone')}
          value={zone}
          onChoose={setZone}
          options={zones.map(({ id, view }) => ({ value: id, text: `${id} (${view})` }))}
        />
        <ChoiceField
          label={t('basis')}
          value={basis}
          onChoose={setBasis}
          options={sizeBases.map((value) => ({ value, text: t(`bases.${value}`) }))}
        />
        <label className="flex min-h-12 items-center gap-2">
          <input type="checkbox" className="size-5" checked={apart} onChange={(event) => setApart(event.target.checked)} />
          {t('apart')}
        </label>
        <Button type="submit" disabled={one === undefined || other === undefined || zone === ''}>
          {t('add')}
        </Button>
      </div>
    </form>
  );
}
