'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Glyph } from '@/components/ui/glyph';
import type { InspectionAnswer } from '@/services/contracts/inspections';

type Equipment = InspectionAnswer['equipment'][number];

export interface ActEquipmentProps {
  readonly id: string;
  /** What the act is called. */
  readonly act: string;
  readonly choices: readonly Equipment[];
  readonly chosen: readonly string[];
  readonly readOnly: boolean;
  readonly onChoose: (ids: string[]) => void;
}

/** The equipment of an act, several pieces where several were used, each with the state of its calibration in words. */
export function ActEquipment({ id, act, choices, chosen, readOnly, onChoose }: ActEquipmentProps) {
  const t = useMessages('inspections');
  const state = ({ calibration }: Equipment) =>
    t(`calibration.${calibration.state}`, { due: calibration.dueOn ?? '–', on: calibration.calibratedOn ?? '–' });
  const free = choices.filter((one) => !chosen.includes(one.id));
  return (
    <div className="flex min-w-0 flex-col gap-1">
      {readOnly ? null : (
        <label className="flex flex-col gap-0.5">
          <span>{t('equipment', { act })}</span>
          <select
            id={id}
            className="field"
            value=""
            onChange={(event) => {
              if (event.target.value !== '') onChoose([...chosen, event.target.value]);
            }}
          >
            <option value="">{chosen.length > 0 ? t('equipmentMore') : t('equipmentChoose')}</option>
            {free.map((one) => (
              <option key={one.id} value={one.id}>
                {one.number} {one.title} – {state(one)}
              </option>
            ))}
          </select>
        </label>
      )}
      <ul>
        {chosen.map((one) => {
          const known = choices.find((choice) => choice.id === one);
          const good = known?.calibration.state === 'in-date';
          return (
            <li key={one} className="flex items-center gap-2">
              <span className={good ? 'text-accept' : 'text-reject'}>
                <Glyph name={good ? 'accept' : 'reject'} />
              </span>
              <span className="min-w-0 flex-1">
                <strong className="font-mono">{known?.number ?? one}</strong> {known?.title}{' '}
                <span className="text-ink-soft">{known ? state(known) : t('equipmentUnknown')}</span>
              </span>
              {readOnly ? null : (
                <Button
                  kind="bare"
                  aria-label={t('equipmentRemove', { number: known?.number ?? one, act })}
                  onClick={() => onChoose(chosen.filter((other) => other !== one))}
                >
                  {t('remove')}
                </Button>
              )}
            </li>
          );
        })}
      </ul>
    </div>
  );
}
