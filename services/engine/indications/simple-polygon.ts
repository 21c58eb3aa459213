import type { PointUm } from '../evaluate/types';

/** Sign of the turn a → b → c, exact for whole micrometres. */
function turn(a: PointUm, b: PointUm, c: PointUm): -1 | 0 | 1 {
  const value = BigInt(b[0] - a[0]) * BigInt(c[1] - a[1]) - BigInt(b[1] - a[1]) * BigInt(c[0] - a[0]);
  return value > 0n ? 1 : value < 0n ? -1 : 0;
}

function between(a: PointUm, b: PointUm, p: PointUm): boolean {
  return (
    Math.min(a[0], b[0]) <= p[0] && p[0] <= Math.max(a[0], b[0]) && Math.min(a[1], b[1]) <= p[1] && p[1] <= Math.max(a[1], b[1])
  );
}

function meet(a: PointUm, b: PointUm, c: PointUm, d: PointUm): boolean {
  const [s1, s2, s3, s4] = [turn(a, b, c), turn(a, b, d), turn(c, d, a), turn(c, d, b)];
  if (s1 !== s2 && s3 !== s4) return s1 * s2 <= 0 && s3 * s4 <= 0;
  return (
    (s1 === 0 && between(a, b, c)) ||
    (s2 === 0 && between(a, b, d)) ||
    (s3 === 0 && between(c, d, a)) ||
    (s4 === 0 && between(c, d, b))
  );
}

/** Do two edges of the closed outline meet other than neighbours at their common corner? Corners are distinct in a row. */
export function bordersMeet(corners: readonly PointUm[]): boolean {
  const count = corners.length;
  const corner = (at: number): PointUm => corners[at % count] ?? [0, 0];
  for (let i = 0; i < count; i += 1) {
    const [before, here, after] = [corner(i + count - 1), corner(i), corner(i + 1)];
    // Neighbours that fold back onto each other meet along a line.
    const back = (before[0] - here[0]) * (after[0] - here[0]) + (before[1] - here[1]) * (after[1] - here[1]) > 0;
    if (turn(before, here, after) === 0 && back) return true;
    for (let j = i + 2; j < count; j += 1) {
      if (i === 0 && j === count - 1) continue;
      if (meet(corner(i), corner(i + 1), corner(j), corner(j + 1))) return true;
    }
  }
  return false;
}
