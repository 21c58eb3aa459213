const form: Intl.DateTimeFormatOptions = {
  year: 'numeric',
  month: '2-digit',
  day: '2-digit',
  hour: '2-digit',
  minute: '2-digit',
  second: '2-digit',
  hourCycle: 'h23',
  timeZoneName: 'short',
};

export interface PlantTime {
  date: string;
  time: string;
  seconds: string;
  zone: string;
}

/** An instant (ISO 8601, UTC) on the plant's wall clock. The zone is always named: 'CET', 'BST', 'GMT+9'. Throws on no date. */
export function plantTime(at: string, timeZone: string): PlantTime {
  const instant = new Date(at);
  if (Number.isNaN(instant.getTime())) throw new RangeError(`not an instant: ${at}`);
  const parts = new Intl.DateTimeFormat('en-GB', { ...form, timeZone }).formatToParts(instant);
  const of = (type: Intl.DateTimeFormatPartTypes) => parts.find((part) => part.type === type)?.value ?? '';
  return {
    date: `${of('year')}-${of('month')}-${of('day')}`,
    time: `${of('hour')}:${of('minute')}`,
    seconds: of('second'),
    zone: of('timeZoneName'),
  };
}
