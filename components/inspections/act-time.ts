import { plantTime } from '@/components/ui/plant-time';

/** The workstation's clock, as a first entry; the server keeps its own times of entry and signature beside it. */
export function clockHere(): string {
  return new Date(performance.timeOrigin + performance.now()).toISOString();
}

/** An instant as the plant's wall clock shows it, for a field: `2026-03-09T14:05`; empty for none. */
export function wallTime(at: string | null | undefined, timeZone: string): string {
  if (!at || Number.isNaN(Date.parse(at))) return '';
  const { date, time } = plantTime(at, timeZone);
  return `${date}T${time}`;
}

/**
 * The instant of a wall-clock time in the plant's zone, ISO in UTC; null for no time. An hour that clock change repeats is
 * taken the first time it comes, one that it leaves out moves on by the change.
 */
export function instantOfWall(wall: string, timeZone: string): string | null {
  const asUtc = Date.parse(`${wall}:00Z`);
  if (!/^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}$/.test(wall) || Number.isNaN(asUtc)) return null;
  const offsetAt = (instantMs: number) => Date.parse(`${wallTime(new Date(instantMs).toISOString(), timeZone)}:00Z`) - instantMs;
  const minute = (ms: number) => Math.floor(ms / 60_000) * 60_000;
  // Offsets before and after any change near that day; the earlier instant that shows this wall time wins.
  const dayMs = 86_400_000;
  const candidates = [asUtc - offsetAt(minute(asUtc - dayMs)), asUtc - offsetAt(minute(asUtc + dayMs))].sort((a, b) => a - b);
  const fitting = candidates.find((ms) => wallTime(new Date(ms).toISOString(), timeZone) === wall);
  const chosen = fitting ?? candidates[1];
  return chosen === undefined ? null : new Date(chosen).toISOString();
}
