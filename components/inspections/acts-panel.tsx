'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Panel } from '@/components/ui/panel';
import type { InspectionContent } from '@/services/contracts/inspection-content';
import type { InspectionAnswer } from '@/services/contracts/inspections';
import type { Draft } from './use-draft';

type Act = InspectionContent['acts'][number];

const exposureFields = ['kV', 'mA', 'exposureS', 'distanceMm', 'indicatorSeen'] as const;

/** The workstation's clock, as a first entry; the server keeps its own times of entry and signature beside it. */
function clockHere(): string {
  return new Date(performance.timeOrigin + performance.now()).toISOString();
}

export interface ActsPanelProps {
  readonly draft: Draft;
  readonly answer: InspectionAnswer;
  readonly me: { readonly id: string; readonly name: string };
  readonly readOnly: boolean;
}

/** Acts of the operation: person and time are set when something of the act is first entered. */
export function ActsPanel({ draft, answer, me, readOnly }: ActsPanelProps) {
  const t = useMessages('inspections');
  const { acts } = draft.content;
  const actOf = (kind: string) => acts.find((one) => one.kind === kind);
  const put = (kind: Act['kind'], next: Partial<Act>) => {
    const before = actOf(kind) ?? {
      kind,
      person: me.id,
      at: clockHere(),
      equipment: [],
      values: {},
    };
    draft.change({ acts: [...acts.filter((one) => one.kind !== kind), { ...before, ...next }] });
  };
  const value = (kind: Act['kind'], name: string, label: string) => (
    <label key={`${kind}${name}`} className="flex flex-col gap-1">
      <span>{label}</span>
      <input
        className="field w-32 text-right font-mono"
        readOnly={readOnly}
        value={actOf(kind)?.values[name] ?? ''}
        onChange={(event) => put(kind, { values: { ...actOf(kind)?.values, [name]: event.target.value } })}
      />
    </label>
  );
  const required = answer.requirement.indicator?.required ?? '–';
  return (
    <Panel title={t('acts')}>
      {answer.neededActs.map(({ kind: text, equipment }) => {
        const kind = text as Act['kind'];
        const act = actOf(kind);
        const steps = kind.startsWith('block-check') ? (answer.requirement.blockCheck?.steps ?? []) : [];
        return (
          <fieldset key={kind} disabled={readOnly} className="mb-3 border-b border-line pb-3">
            <legend className="font-semibold">
              <label className="flex min-h-12 items-center gap-2">
                <input
                  type="checkbox"
                  checked={act !== undefined}
                  onChange={(event) =>
                    event.target.checked ? put(kind, {}) : draft.change({ acts: acts.filter((one) => one.kind !== kind) })
                  }
                />
                {t(`act.${kind}`)}
                <span className="font-normal text-ink-soft">
                  {answer.people.find(({ id }) => id === act?.person)?.name ?? ''}
                </span>
              </label>
            </legend>
            <div className="flex flex-wrap gap-3">
              {steps.map(({ nominal }) => value(kind, nominal, t('step', { nominal, act: t(`act.${kind}`) })))}
              {kind === 'exposed' ? exposureFields.map((name) => value(kind, name, t(`exposure.${name}`, { required }))) : null}
              {equipment ? (
                <label className="flex flex-col gap-1">
                  <span>{t('equipment', { act: t(`act.${kind}`) })}</span>
                  <select
                    className="field"
                    value={act?.equipment[0] ?? ''}
                    onChange={(event) => put(kind, { equipment: event.target.value === '' ? [] : [event.target.value] })}
                  >
                    <option value="">–</option>
                    {answer.equipment.map((one) => (
                      <option key={one.id} value={one.id}>
                        {t('calibrated', { number: one.number, title: one.title, state: one.calibration.state })}
                      </option>
                    ))}
                  </select>
                </label>
              ) : null}
            </div>
          </fieldset>
        );
      })}
      <label className="flex min-h-12 items-center gap-2 font-semibold">
        <input
          type="checkbox"
          disabled={readOnly}
          checked={draft.content.examined}
          onChange={(event) => draft.change({ examined: event.target.checked })}
        />
        {t('examined')}
      </label>
      <label className="flex flex-col gap-1">
        <span className="font-semibold">{t('notes')}</span>
        <textarea
          className="field"
          rows={2}
          readOnly={readOnly}
          value={draft.content.notes}
          onChange={(event) => draft.change({ notes: event.target.value })}
        />
      </label>
    </Panel>
  );
}
