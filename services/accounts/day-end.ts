function wallOffsetMs(instantMs: number, zone: string): number {
  const parts = new Intl.DateTimeFormat('en-GB', {
    timeZone: zone,
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
    hour: '2-digit',
    minute: '2-digit',
    second: '2-digit',
    hourCycle: 'h23',
  }).formatToParts(new Date(instantMs));
  const of = (type: Intl.DateTimeFormatPartTypes) => Number(parts.find((part) => part.type === type)?.value ?? 0);
  return Date.UTC(of('year'), of('month') - 1, of('day'), of('hour'), of('minute'), of('second')) - instantMs;
}

/** The instant at which a calendar day ends in a zone: midnight that follows it, ISO in UTC. */
export function dayEnd(day: string, zone: string): string {
  const [year = 0, month = 1, date = 1] = day.split('-').map(Number);
  const wall = Date.UTC(year, month - 1, date + 1);
  // Twice, because the offset at the guess may be that of the other side of a clock change.
  const guess = wall - wallOffsetMs(wall, zone);
  return new Date(wall - wallOffsetMs(guess, zone)).toISOString().replace('Z', '000Z');
}
