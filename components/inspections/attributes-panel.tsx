'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Panel } from '@/components/ui/panel';
import { VerdictMark } from '@/components/ui/verdict-mark';
import type { NumberedRow } from './plan-rows';
import type { Draft } from './use-draft';

const results = ['conforming', 'nonconforming', 'not-inspected'] as const;
const labels = { conforming: 'conforming', nonconforming: 'nonconforming', 'not-inspected': 'notInspected' } as const;

/** Yes-or-no characteristics; what does not conform, or was not inspected, says why. */
export function AttributesPanel({ draft, rows, readOnly }: { draft: Draft; rows: readonly NumberedRow[]; readOnly: boolean }) {
  const t = useMessages('inspections');
  const { attributes } = draft.content;
  const put = (number: string, result: (typeof results)[number], reason?: string) => {
    const order = rows.map((row) => row.number);
    const others = attributes.filter((one) => one.number !== number);
    const next = [...others, { number, result, ...(reason ? { reason: reason.slice(0, 400) } : {}) }];
    draft.change({ attributes: next.sort((a, b) => order.indexOf(a.number) - order.indexOf(b.number)) });
  };
  return (
    <Panel title={t('attributes')}>
      {rows.map(({ number, title }) => {
        const place = attributes.findIndex((one) => one.number === number);
        const given = attributes[place];
        const judged = draft.judgement.evaluation?.attributes.find((one) => one.number === number);
        const fault = draft.judgement.faults.find(({ path }) => path.startsWith(`attributes.${String(place)}.`));
        return (
          <fieldset key={number} disabled={readOnly} className="mb-2 border-b border-line pb-2 last:mb-0 last:border-b-0">
            <legend className="font-semibold">
              <span className="font-mono">{number}</span> {title}
            </legend>
            <div className="flex flex-wrap items-center gap-x-5">
              {results.map((result, first) => (
                <label key={result} className="flex min-h-12 items-center gap-2">
                  <input
                    type="radio"
                    id={first === 0 ? `attribute-${number}` : undefined}
                    name={`attribute-${number}`}
                    className="size-5"
                    checked={given?.result === result}
                    onChange={() => put(number, result, given?.reason ?? undefined)}
                  />
                  {t(labels[result])}
                </label>
              ))}
              {judged ? <VerdictMark verdict={judged.verdict} /> : null}
            </div>
            {given && given.result !== 'conforming' ? (
              <input
                className="field w-full"
                aria-label={t('why', { number })}
                placeholder={t('why', { number })}
                maxLength={400}
                value={given.reason ?? ''}
                onChange={(event) => put(number, given.result, event.target.value)}
              />
            ) : null}
            {fault ? <p className="text-sm font-semibold text-reject">{fault.message}</p> : null}
          </fieldset>
        );
      })}
    </Panel>
  );
}
