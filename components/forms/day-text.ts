/**
 * A calendar day as 2026-03-09 out of what was typed: '2026-03-09', '2026/3/9', '20260309' – always year first, so that
 * the ninth of March and the third of September cannot be confused. Undefined for anything else and for days that do not exist.
 */
export function dayFrom(text: string): string | undefined {
  const match = /^(\d{4})[-/. ]?(\d{1,2})[-/. ]?(\d{1,2})$/.exec(text.trim());
  if (!match || (/^\d+$/.test(text.trim()) && text.trim().length !== 8)) return undefined;
  const [, year = '', month = '', day = ''] = match;
  const iso = `${year}-${month.padStart(2, '0')}-${day.padStart(2, '0')}`;
  const instant = new Date(`${iso}T00:00:00Z`);
  return !Number.isNaN(instant.getTime()) && instant.toISOString().startsWith(iso) ? iso : undefined;
}
