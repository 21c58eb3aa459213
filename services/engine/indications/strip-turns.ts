import { turnOf } from './geometry/points';
import type { Vector } from './geometry/points';

/** A direction of the strip's normal, by angle, at which a place enters or leaves it or two places change their order along it. */
export interface Turn {
  readonly at: number;
  readonly normal: Vector;
  readonly change: { readonly kind: 'swap' } | { readonly kind: 'enter' | 'leave'; readonly position: number };
}

/** At (x, y) a place at `step` from the anchor crosses the lower or upper border. */
function crossing(x: number, y: number, step: Vector, position: number, upper: boolean): Turn {
  const rises = x * step.y - y * step.x > 0;
  return { at: turnOf(x, y), normal: { x, y }, change: { kind: rises !== upper ? 'enter' : 'leave', position } };
}

/** Where a place crosses the borders of a strip whose lower border runs through the anchor. */
export function crossings(step: Vector, position: number, stripWidth: number): readonly Turn[] {
  const size = Math.sqrt(step.x * step.x + step.y * step.y);
  if (size === 0) return [];
  const u = { x: step.x / size, y: step.y / size };
  const lower = [crossing(-u.y, u.x, step, position, false), crossing(u.y, -u.x, step, position, false)];
  if (size < stripWidth) return lower;
  const cos = stripWidth / size;
  const sin = Math.sqrt(Math.max(0, (1 - cos) * (1 + cos)));
  return [
    ...lower,
    crossing(u.x * cos - u.y * sin, u.y * cos + u.x * sin, step, position, true),
    crossing(u.x * cos + u.y * sin, u.y * cos - u.x * sin, step, position, true),
  ];
}

const NEAR = 1e-3;

/** Where two places change their order: the normal points from one to the other, and both lie in the strip. */
export function swaps(one: Vector, other: Vector, stripWidth: number): readonly Turn[] {
  const dx = other.x - one.x;
  const dy = other.y - one.y;
  const gap = Math.sqrt(dx * dx + dy * dy);
  const turns: Turn[] = [];
  for (const sign of [1, -1]) {
    const n = { x: (sign * dx) / gap, y: (sign * dy) / gap };
    const low = n.x * one.x + n.y * one.y;
    const high = n.x * other.x + n.y * other.y;
    if (Math.min(low, high) > -NEAR && Math.max(low, high) < stripWidth + NEAR) {
      turns.push({ at: turnOf(n.x, n.y), normal: n, change: { kind: 'swap' } });
    }
  }
  return turns;
}

/** Half-way from one direction on to another at most half a turn further. */
export function middleOf(from: Vector, to: Vector): Vector {
  const x = from.x + to.x;
  const y = from.y + to.y;
  const size = Math.sqrt(x * x + y * y);
  // Half a turn apart they have no middle by adding.
  return size > 1e-9 ? { x: x / size, y: y / size } : { x: -from.y, y: from.x };
}
