'use client';

import { useMemo, useState } from 'react';
import { EngineSentence } from '@/components/inspections/engine-sentence';
import { decimalFrom } from '@/components/forms/decimal-text';
import { useMethodWords } from '@/components/personnel/method-words';
import { useMessages } from '@/components/theme/use-messages';
import { Panel } from '@/components/ui/panel';
import { VerdictMark } from '@/components/ui/verdict-mark';
import { method } from '@/services/contracts/common';
import type { PlanContent } from '@/services/contracts/plan-content';
import { evaluate } from '@/services/engine/evaluate/evaluate';
import type { Criteria } from '@/services/engine/evaluate/types';

interface Tried {
  readonly readings: Readonly<Record<string, { readonly value: string; readonly expanded: string }>>;
  readonly indication: {
    readonly type: string;
    readonly method: string;
    readonly zone: string;
    readonly length: string;
    readonly width: string;
  };
}

const nothing: Tried = { readings: {}, indication: { type: 'gas-pore', method: 'penetrant', zone: '', length: '', width: '' } };

function sizeUm(text: string, unit: 'mm' | 'in'): number | undefined {
  const decimal = decimalFrom(text);
  return decimal === undefined ? undefined : Math.round(Number(decimal) * (unit === 'in' ? 25_400 : 1000));
}

/** The observations of a trial: entries that are no decimals yet are left out, so that the rest is judged meanwhile. */
function observationsOf(criteria: Criteria, { readings, indication }: Tried): Record<string, unknown> {
  const { type, method: by, zone: zoneId } = indication;
  const unit = criteria.lengthUnit ?? 'mm';
  const [length, width] = [sizeUm(indication.length, unit), sizeUm(indication.width, unit)];
  const zone = criteria.zones?.find(({ id }) => id === zoneId);
  const seen = zone && length !== undefined && width !== undefined;
  return {
    methods: [by],
    readings: (criteria.characteristics ?? []).flatMap(({ number, unit: own }) => {
      const value = decimalFrom(readings[number]?.value ?? '');
      const expanded = decimalFrom(readings[number]?.expanded ?? '');
      if (value === undefined) return [];
      return [
        { characteristic: number, value, unit: own, ...(expanded === undefined ? {} : { uncertainty: { expanded, k: '2' } }) },
      ];
    }),
    indications: seen
      ? [
          {
            id: '1',
            method: by,
            type,
            view: zone.view,
            shape: { kind: 'entered', length, width, zone: zone.id, basis: 'comparator', apart: true },
          },
        ]
      : [],
  };
}

/** Sample entries judged by the engine under the criteria as they are typed: what the limits will do before anybody is bound by them. */
export function TryOut({ content }: { readonly content: PlanContent }) {
  const t = useMessages('plans');
  const methodWords = useMethodWords();
  const [tried, setTried] = useState<Tried>(nothing);
  const criteria = content.criteria as Criteria;
  const judged = useMemo(
    () =>
      evaluate(
        { criteria: content.criteria, observations: observationsOf(content.criteria as Criteria, tried) },
        { zoneless: 'not-evaluable' },
      ),
    [content, tried],
  );
  const put = (next: Partial<Tried['indication']>) => setTried({ ...tried, indication: { ...tried.indication, ...next } });
  const reading = (number: string, next: object) => {
    const before = tried.readings[number] ?? { value: '', expanded: '' };
    setTried({ ...tried, readings: { ...tried.readings, [number]: { ...before, ...next } } });
  };
  const field = (label: string, value: string, onValue: (text: string) => void) => (
    <label className="flex flex-col gap-0.5">
      <span className="text-sm font-semibold">{label}</span>
      <input className="field font-mono" value={value} onChange={(event) => onValue(event.target.value)} />
    </label>
  );
  return (
    <div className="grid gap-4 lg:grid-cols-2">
      <Panel title={t('tryEntries')} subtitle={t('tryHint')}>
        <div className="flex flex-col gap-2">
          {(criteria.characteristics ?? []).map(({ number, unit }) => (
            <div key={number} className="grid grid-cols-2 gap-3">
              {field(t('tryReading', { number, unit }), tried.readings[number]?.value ?? '', (value) =>
                reading(number, { value }),
              )}
              {field(t('tryUncertainty', { number }), tried.readings[number]?.expanded ?? '', (expanded) =>
                reading(number, { expanded }),
              )}
            </div>
          ))}
          <div className="grid grid-cols-2 gap-3 border-t border-line pt-2">
            {field(t('tryType'), tried.indication.type, (type) => put({ type }))}
            <label className="flex flex-col gap-0.5">
              <span className="text-sm font-semibold">{t('method')}</span>
              <select className="field" value={tried.indication.method} onChange={(event) => put({ method: event.target.value })}>
                {method.options.map((one) => (
                  <option key={one} value={one}>
                    {methodWords(one)}
                  </option>
                ))}
              </select>
            </label>
            {field(t('tryLength'), tried.indication.length, (length) => put({ length }))}
            {field(t('tryWidth'), tried.indication.width, (width) => put({ width }))}
            <label className="flex flex-col gap-0.5">
              <span className="text-sm font-semibold">{t('tryZone')}</span>
              <select className="field" value={tried.indication.zone} onChange={(event) => put({ zone: event.target.value })}>
                <option value="">–</option>
                {(criteria.zones ?? []).map(({ id }) => (
                  <option key={id} value={id}>
                    {id}
                  </option>
                ))}
              </select>
            </label>
          </div>
        </div>
      </Panel>
      <Panel title={t('tryAnswer')}>
        <div role="status" className="flex flex-col gap-2">
          {judged.ok ? (
            [...judged.answer.readings, ...judged.answer.rules].map((row, place) => (
              <p key={place} className="flex items-baseline gap-3 border-b border-line pb-1">
                <VerdictMark verdict={row.verdict} />
                <span>
                  <EngineSentence sentence={row.sentence} />
                </span>
              </p>
            ))
          ) : (
            <ul className="list-disc pl-5">
              {judged.faults.map(({ path, message }) => (
                <li key={`${path} ${message}`}>
                  <span className="font-mono">{path}</span> {message}
                </li>
              ))}
            </ul>
          )}
        </div>
      </Panel>
    </div>
  );
}
