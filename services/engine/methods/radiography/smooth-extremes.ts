export interface Extremes {
  readonly most: number;
  readonly least: number;
}

/**
 * Largest and least height of a stretch of samples about a place, on the parabola of least squares through them: a single noisy
 * sample would always be taken for the peak and make every dip too deep. With fewer than four samples, of the samples
 * themselves. `place` and `reach` are in samples and need not be whole.
 */
export function extremeAbout(heights: readonly number[], place: number, reach: number): Extremes {
  const from = Math.max(0, Math.ceil(place - reach));
  const samples = heights.slice(from, Math.max(Math.floor(place + reach) + 1, from + 1));
  if (samples.length < 4) {
    const nearest = heights[Math.min(Math.max(Math.round(place), 0), heights.length - 1)] ?? 0;
    const all = samples.length === 0 ? [nearest] : samples;
    return { most: Math.max(...all), least: Math.min(...all) };
  }
  const count = samples.length;
  const middle = (count - 1) / 2;
  // Centred, the three normal equations fall apart into the slope and a pair for level and bend.
  let [s2, s4, sv, sxv, sxxv] = [0, 0, 0, 0, 0];
  samples.forEach((height, at) => {
    const x = at - middle;
    s2 += x * x;
    s4 += x * x * x * x;
    sv += height;
    sxv += x * height;
    sxxv += x * x * height;
  });
  const bend = (count * sxxv - s2 * sv) / (count * s4 - s2 * s2);
  const slope = sxv / s2;
  const level = (sv - bend * s2) / count;
  const at = (x: number) => level + x * (slope + x * bend);
  const candidates = [at(-middle), at(middle)];
  const vertex = bend === 0 ? middle : -slope / (2 * bend);
  if (vertex > -middle && vertex < middle) candidates.push(at(vertex));
  return { most: Math.max(...candidates), least: Math.min(...candidates) };
}
