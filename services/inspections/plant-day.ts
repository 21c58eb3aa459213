/** Calendar day of an instant at the plant, `2026-03-09`. `iso` must be a valid instant, `zone` an IANA zone. */
export function plantDay(iso: string, zone: string): string {
  // en-CA prints year-month-day.
  return new Intl.DateTimeFormat('en-CA', { timeZone: zone, year: 'numeric', month: '2-digit', day: '2-digit' }).format(
    new Date(iso),
  );
}

/** The same day of the month `months` earlier; 31 falls to the month's last day. */
export function monthsBefore(day: string, months: number): string {
  const [year = 0, month = 1, date = 1] = day.split('-').map(Number);
  const index = year * 12 + (month - 1) - months;
  const lastDay = new Date(Date.UTC(Math.floor(index / 12), (index % 12) + 1, 0)).getUTCDate();
  const two = (value: number) => String(value).padStart(2, '0');
  return `${String(Math.floor(index / 12)).padStart(4, '0')}-${two((index % 12) + 1)}-${two(Math.min(date, lastDay))}`;
}
