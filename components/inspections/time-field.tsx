'use client';

import { useState } from 'react';
import { usePlant } from '@/components/theme/workstation';
import { plantTime } from '@/components/ui/plant-time';
import { instantOfWall, wallTime } from './act-time';
import { goOn } from './go-on';

export interface TimeFieldProps {
  readonly label: string;
  /** ISO in UTC. */
  readonly at: string | null | undefined;
  readonly readOnly: boolean;
  readonly onChange: (at: string) => void;
  /** Said beside the field while what is typed is no time. */
  readonly wrong: string;
}

/** A time on the plant's clock, written as everywhere here: 2026-03-09 14:05, with the zone named. */
export function TimeField({ label, at, readOnly, onChange, wrong }: TimeFieldProps) {
  const { timeZone } = usePlant();
  const shown = wallTime(at, timeZone).replace('T', ' ');
  const [typed, setTyped] = useState<string | null>(null);
  const isWrong = typed !== null && instantOfWall(typed.trim().replace(/\s+/, 'T'), timeZone) === null;
  const take = () => {
    const instant = typed === null ? null : instantOfWall(typed.trim().replace(/\s+/, 'T'), timeZone);
    if (instant === null) return;
    // A time that was only looked at keeps its seconds.
    if (wallTime(instant, timeZone) !== wallTime(at, timeZone)) onChange(instant);
    setTyped(null);
  };
  return (
    <label className="flex flex-col gap-0.5">
      <span>{label}</span>
      <span className="flex items-center gap-2">
        <input
          className="field max-w-48 font-mono tabular-nums"
          data-next=""
          autoComplete="off"
          aria-invalid={isWrong || undefined}
          readOnly={readOnly}
          value={typed ?? shown}
          onChange={(event) => setTyped(event.target.value)}
          onBlur={take}
          onKeyDown={goOn}
        />
        <span className="text-ink-soft">{shown === '' || !at ? '' : plantTime(at, timeZone).zone}</span>
      </span>
      {isWrong ? <span className="text-sm font-semibold text-reject">{wrong}</span> : null}
    </label>
  );
}
