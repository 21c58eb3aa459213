import { describe, expect, it } from 'vitest';
import { endOfDay } from '../../components/trace/end-of-day';

// Clock changes as published by the IANA time zone database (rules EU and US; from memory): Europe on the last Sundays of
// March and October, the United States on the second Sunday of March and the first of November.
describe('the end of a day on the plant’s clock', () => {
  it.each([
    ['2026-06-01', 'UTC', '2026-06-01T23:59:59.999999Z'],
    ['2026-06-01', 'Europe/Paris', '2026-06-01T21:59:59.999999Z'],
    ['2026-01-15', 'Europe/Paris', '2026-01-15T22:59:59.999999Z'],
    ['2026-03-29', 'Europe/Paris', '2026-03-29T21:59:59.999999Z'],
    ['2026-10-25', 'Europe/Paris', '2026-10-25T22:59:59.999999Z'],
    ['2026-11-01', 'America/New_York', '2026-11-02T04:59:59.999999Z'],
    ['2026-03-08', 'America/New_York', '2026-03-09T03:59:59.999999Z'],
    ['2026-12-31', 'Asia/Kolkata', '2026-12-31T18:29:59.999999Z'],
  ])('%s in %s is %s', (day, zone, expected) => {
    expect(endOfDay(day, zone)).toBe(expected);
  });

  it('refuses what is no day', () => {
    expect(() => endOfDay('2026-13-01', 'UTC')).toThrow(RangeError);
  });
});
