/** A quantity that depends on a direction (cos, sin). */
export type Turning = (cos: number, sin: number) => number;

const samples = 360;
const golden = (Math.sqrt(5) - 1) / 2;

function at(value: Turning, angle: number): number {
  return value(Math.cos(angle), Math.sin(angle));
}

/** Narrows a maximum between two angles until the angles cannot be told apart. */
function narrow(value: Turning, from: number, to: number): number {
  let [low, high] = [from, to];
  let [a, b] = [high - golden * (high - low), low + golden * (high - low)];
  let [fa, fb] = [at(value, a), at(value, b)];
  for (let step = 0; step < 72 && high - low > 1e-15; step += 1) {
    if (fa >= fb) {
      [high, b, fb] = [b, a, fa];
      a = high - golden * (high - low);
      fa = at(value, a);
    } else {
      [low, a, fa] = [a, b, fb];
      b = low + golden * (high - low);
      fb = at(value, b);
    }
  }
  return Math.max(fa, fb);
}

/**
 * Largest value over all directions. Every local maximum of a fine sampling is narrowed, since widths of unions have
 * several; quarter turns are sampled exactly.
 */
export function best(value: Turning): number {
  const step = (2 * Math.PI) / samples;
  const seen = Array.from({ length: samples }, (_, index) => at(value, index * step));
  let most = Math.max(value(1, 0), value(0, 1), value(-1, 0), value(0, -1), ...seen);
  const slack = Math.abs(most) * 1e-3 + 1;
  for (const [index, here] of seen.entries()) {
    const before = seen[(index + samples - 1) % samples] ?? here;
    const after = seen[(index + 1) % samples] ?? here;
    if (here < before || here < after || here < most - slack - Math.abs(here - before) - Math.abs(here - after)) continue;
    most = Math.max(most, narrow(value, (index - 1) * step, (index + 1) * step));
  }
  return most;
}
