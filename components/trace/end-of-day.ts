import { plantTime } from '@/components/ui/plant-time';

/** The last instant of a calendar day on the plant's clock, as an ISO instant in UTC. Throws on no day. */
export function endOfDay(day: string, timeZone: string): string {
  const wall = Date.parse(`${day}T23:59:00Z`);
  if (Number.isNaN(wall)) throw new RangeError(`not a day: ${day}`);
  let instant = wall;
  // Twice: the first guess can lie on the other side of a change of clocks.
  for (let turn = 0; turn < 2; turn += 1) {
    const { date, time } = plantTime(new Date(instant).toISOString(), timeZone);
    instant += wall - Date.parse(`${date}T${time}:00Z`);
  }
  return new Date(instant).toISOString().replace(':00.000Z', ':59.999999Z');
}
