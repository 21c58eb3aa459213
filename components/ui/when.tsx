'use client';

import { usePlant } from '@/components/theme/workstation';
import { plantTime } from './plant-time';

export interface WhenProps {
  /** ISO 8601 in UTC, or null for never. */
  at: string | null;
  /** 'day' leaves the hour out; 'second' adds seconds. */
  to?: 'day' | 'minute' | 'second';
}

/** A time on the plant's clock, with the zone named: 2026-03-09 14:05 CET. A calendar day (no hour) is shown as it is. */
export function When({ at, to = 'minute' }: WhenProps) {
  const { timeZone } = usePlant();
  if (at === null) return <span className="text-ink-soft">–</span>;
  if (/^\d{4}-\d{2}-\d{2}$/.test(at)) return <time dateTime={at}>{at}</time>;
  const { date, time, seconds, zone } = plantTime(at, timeZone);
  return (
    <time dateTime={at} className="whitespace-nowrap">
      {date}
      {to !== 'day' && (
        <>
          {` ${time}${to === 'second' ? `:${seconds}` : ''} `}
          <span className="text-ink-soft">{zone}</span>
        </>
      )}
    </time>
  );
}
