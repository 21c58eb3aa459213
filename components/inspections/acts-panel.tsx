'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Glyph } from '@/components/ui/glyph';
import { Panel } from '@/components/ui/panel';
import { When } from '@/components/ui/when';
import type { InspectionContent } from '@/services/contracts/inspection-content';
import type { InspectionAnswer } from '@/services/contracts/inspections';
import { ActFields } from './act-fields';
import { clockHere } from './act-time';
import type { Draft } from './use-draft';

type Act = InspectionContent['acts'][number];

export interface ActsPanelProps {
  readonly draft: Draft;
  readonly answer: InspectionAnswer;
  readonly me: { readonly id: string };
  readonly readOnly: boolean;
}

/** The process checks that must cover the act, with their state in words. */
function Checks({ checks }: { checks: InspectionAnswer['checks'] }) {
  const t = useMessages('inspections');
  if (checks.length === 0) return null;
  return (
    <ul aria-label={t('checks')} className="mb-2 border-b border-line pb-2">
      {checks.map(({ scope, state, title, validUntil }) => (
        <li key={`${scope} ${title ?? ''}`} className="flex items-center gap-2">
          <span className={state === 'good' ? 'text-accept' : 'text-reject'}>
            <Glyph name={state === 'good' ? 'accept' : 'reject'} />
          </span>
          <span>
            <strong>{scope}</strong>: {t(`check.${state}`)} {title ? <span className="text-ink-soft">({title})</span> : null}{' '}
            {validUntil ? (
              <>
                {t('until')} <When at={validUntil} />
              </>
            ) : null}
          </span>
        </li>
      ))}
    </ul>
  );
}

/** Acts of the operation: person and time are set when something of the act is first entered, and can be corrected. */
export function ActsPanel({ draft, answer, me, readOnly }: ActsPanelProps) {
  const t = useMessages('inspections');
  const { acts } = draft.content;
  const order = answer.neededActs.map(({ kind }) => kind);
  const put = (kind: Act['kind'], next: Partial<Act>) => {
    const before = acts.find((one) => one.kind === kind) ?? { kind, person: me.id, at: clockHere(), equipment: [], values: {} };
    const all = [...acts.filter((one) => one.kind !== kind), { ...before, ...next }];
    draft.change({ acts: all.sort((a, b) => order.indexOf(a.kind) - order.indexOf(b.kind)) });
  };
  return (
    <Panel title={t('acts')}>
      <Checks checks={answer.checks} />
      {answer.neededActs.map(({ kind: text, equipment }) => {
        const kind = text as Act['kind'];
        return (
          <ActFields
            key={kind}
            kind={kind}
            act={acts.find((one) => one.kind === kind)}
            needsEquipment={equipment}
            answer={answer}
            readOnly={readOnly}
            onDone={(done) => (done ? put(kind, {}) : draft.change({ acts: acts.filter((one) => one.kind !== kind) }))}
            onChange={(next) => put(kind, next)}
          />
        );
      })}
      <label className="flex min-h-12 items-center gap-2 font-semibold">
        <input
          id="examined"
          type="checkbox"
          className="size-5 shrink-0"
          disabled={readOnly}
          checked={draft.content.examined}
          onChange={(event) => draft.change({ examined: event.target.checked })}
        />
        {t('examined')}
      </label>
      <label className="flex flex-col gap-0.5">
        <span className="font-semibold">{t('notes')}</span>
        <textarea
          className="field"
          rows={2}
          maxLength={4000}
          readOnly={readOnly}
          value={draft.content.notes}
          onChange={(event) => draft.change({ notes: event.target.value })}
        />
      </label>
    </Panel>
  );
}
