'use client';

import { useMessages } from '@/components/theme/use-messages';
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

function Named({ number, known, words }: { number: string; known: Equipment | undefined; words: string }) {
  const good = known?.calibration.state === 'in-date';
  return (
    <>
      <span className={good ? 'text-accept' : 'text-reject'}>
        <Glyph name={good ? 'accept' : 'reject'} />
      </span>
      <span className="min-w-0 flex-1">
        <strong className="font-mono">{number}</strong> {known?.title} <span className="text-ink-soft">{words}</span>
      </span>
    </>
  );
}

/**
 * The equipment of an act, several pieces where several were used, each with the state of its calibration in words.
 * Boxes and no list to open: arrows in a list would take every piece that they pass.
 */
export function ActEquipment({ id, act, choices, chosen, readOnly, onChoose }: ActEquipmentProps) {
  const t = useMessages('inspections');
  const state = ({ calibration }: Equipment) =>
    t(`calibration.${calibration.state}`, { due: calibration.dueOn ?? '–', on: calibration.calibratedOn ?? '–' });
  const strangers = chosen.filter((one) => !choices.some((choice) => choice.id === one));
  const rows = [
    ...(readOnly ? choices.filter((one) => chosen.includes(one.id)) : choices).map((one) => ({ id: one.id, known: one })),
    ...strangers.map((one) => ({ id: one, known: undefined })),
  ];
  return (
    <fieldset id={id} tabIndex={-1} className="min-w-0">
      <legend>{t('equipment', { act })}</legend>
      <ul className="max-h-60 overflow-y-auto">
        {rows.map((row) => {
          const number = row.known?.number ?? row.id;
          const words = row.known ? state(row.known) : t('equipmentUnknown');
          return (
            <li key={row.id}>
              <label className="flex min-h-12 items-center gap-2">
                {readOnly ? null : (
                  <input
                    type="checkbox"
                    className="size-5 shrink-0"
                    checked={chosen.includes(row.id)}
                    onChange={(event) =>
                      onChoose(event.target.checked ? [...chosen, row.id] : chosen.filter((other) => other !== row.id))
                    }
                  />
                )}
                <Named number={number} known={row.known} words={words} />
              </label>
            </li>
          );
        })}
      </ul>
    </fieldset>
  );
}
