'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Panel } from '@/components/ui/panel';
import type { NumberedRow } from './plan-rows';
import type { Draft } from './use-draft';

const results = ['conforming', 'nonconforming', 'not-inspected'] as const;
const labels = { conforming: 'conforming', nonconforming: 'nonconforming', 'not-inspected': 'notInspected' } as const;

/** Yes-or-no characteristics. */
export function AttributesPanel({ draft, rows, readOnly }: { draft: Draft; rows: readonly NumberedRow[]; readOnly: boolean }) {
  const t = useMessages('inspections');
  const { attributes } = draft.content;
  const put = (number: string, result: (typeof results)[number], reason?: string) =>
    draft.change({
      attributes: [...attributes.filter((one) => one.number !== number), { number, result, ...(reason ? { reason } : {}) }],
    });
  return (
    <Panel title={t('attributes')}>
      {rows.map(({ number, title }) => {
        const given = attributes.find((one) => one.number === number);
        return (
          <fieldset key={number} disabled={readOnly} className="mb-3">
            <legend className="font-semibold">
              <span className="font-mono">{number}</span> {title}
            </legend>
            <div className="flex flex-wrap gap-4">
              {results.map((result) => (
                <label key={result} className="flex min-h-12 items-center gap-2">
                  <input
                    type="radio"
                    name={`attribute-${number}`}
                    checked={given?.result === result}
                    onChange={() => put(number, result, given?.reason ?? undefined)}
                  />
                  {t(labels[result])}
                </label>
              ))}
            </div>
            {given?.result === 'not-inspected' ? (
              <input
                className="field w-full"
                aria-label={t('why', { number })}
                value={given.reason ?? ''}
                onChange={(event) => put(number, 'not-inspected', event.target.value)}
              />
            ) : null}
          </fieldset>
        );
      })}
    </Panel>
  );
}
