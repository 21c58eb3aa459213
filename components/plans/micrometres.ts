/** A corner on a view: whole micrometres, y upwards. */
export type Corner = readonly [number, number];

/** Micrometres as millimetres with three decimals, as a drawing writes them: 12500 is `12.500`. */
export function mmText(um: number): string {
  const sign = um < 0 ? '-' : '';
  const whole = Math.abs(um);
  return `${sign}${String(Math.floor(whole / 1000))}.${String(whole % 1000).padStart(3, '0')}`;
}

/** Whole micrometres of millimetres as typed, comma or point; undefined for what is no such number. */
export function umOfMm(text: string): number | undefined {
  const [, sign, whole, part = ''] = /^\s*(-?)(\d{1,6})(?:[.,](\d{1,3}))?\s*$/.exec(text) ?? [];
  if (whole === undefined) return undefined;
  const um = Number(whole) * 1000 + Number(part.padEnd(3, '0'));
  return sign === '-' && um !== 0 ? -um : um;
}

/** The place in a polygon, after which a new corner bends it least: the side nearest to the point. */
export function sideNearest(corners: readonly Corner[], [x, y]: Corner): number {
  let best = corners.length - 1;
  let least = Number.POSITIVE_INFINITY;
  corners.forEach(([ax, ay], place) => {
    const [bx, by] = corners[(place + 1) % corners.length] ?? [ax, ay];
    const length = (bx - ax) ** 2 + (by - ay) ** 2;
    const along = length === 0 ? 0 : Math.min(1, Math.max(0, ((x - ax) * (bx - ax) + (y - ay) * (by - ay)) / length));
    const away = (x - ax - along * (bx - ax)) ** 2 + (y - ay - along * (by - ay)) ** 2;
    if (away < least) [least, best] = [away, place];
  });
  return best;
}
