'use client';

import { useMessages } from '@/components/theme/use-messages';
import { useWorkstation } from '@/components/theme/workstation';
import { VerdictMark } from '@/components/ui/verdict-mark';
import type { EvaluationAnswer } from '@/services/contracts/evaluate';
import { renderSentence } from '@/services/engine/sentences/sentence';

type RuleRow = EvaluationAnswer['rules'][number];

interface Said {
  readonly row: RuleRow;
  readonly text: string;
}

/** Rules that say the same (one for each zone, before anything was examined) are said once. */
function Rows({ rules }: { rules: readonly RuleRow[] }) {
  const { locale } = useWorkstation();
  const said = new Map<string, Said>();
  for (const row of rules) {
    const text = renderSentence(row.sentence.code, row.sentence.parameters, locale);
    said.set(`${row.verdict} ${row.clause ?? ''} ${text}`, { row, text });
  }
  return (
    <ul>
      {[...said].map(([key, { row, text }]) => (
        <li key={key} className="flex items-baseline gap-3 py-0.5">
          <VerdictMark verdict={row.verdict} />
          <span className="text-sm">
            {row.clause ? <strong>{row.clause}: </strong> : null}
            {text}
          </span>
        </li>
      ))}
    </ul>
  );
}

/** Every rule with its verdict: what is broken or waits stands open, what is kept is folded away. */
export function RulesList({ rules }: { rules: readonly RuleRow[] }) {
  const t = useMessages('inspections');
  const kept = rules.filter(({ verdict }) => verdict === 'accept');
  const others = rules.filter(({ verdict }) => verdict !== 'accept');
  return (
    <div className="mt-3 border-t border-line pt-2">
      {others.length > 0 ? <Rows rules={others} /> : null}
      {kept.length > 0 ? (
        <details>
          <summary className="control flex cursor-pointer items-center font-semibold">
            {t('rulesKept', { count: kept.length })}
          </summary>
          <Rows rules={kept} />
        </details>
      ) : null}
    </div>
  );
}
