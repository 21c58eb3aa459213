import { absolute, exact } from '../../quantity/roots';
import { divide, multiply, subtract } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { notAboveZero } from '../bounds';
import { derived, refused } from '../derived';
import type { Derived } from '../derived';

// A square of 88.6 µm has the area of a round aperture of 100 µm.
const APERTURE_MM = exact('0.0886');

/** Signal-to-noise ratio: mean over standard deviation of linear grey values. Source: ASTM E2698, E2446. */
export function signalToNoise(mean: Rational, deviation: Rational): Derived<Rational> {
  return notAboveZero({ mean, deviation }) ?? derived(divide(mean, deviation));
}

/** Normalised to the basic spatial resolution: SNR · 88.6 µm/SRb. Source: ASTM E2446; EN 12681-2 (from memory). */
export function normalisedSignalToNoise(ratio: Rational, resolutionMm: Rational): Derived<Rational> {
  return notAboveZero({ ratio, resolutionMm }) ?? derived(divide(multiply(ratio, APERTURE_MM), resolutionMm));
}

/** Contrast-to-noise ratio: difference of two means over the deviation of the background. Source: ASTM E2698. */
export function contrastToNoise(mean: Rational, backgroundMean: Rational, deviation: Rational): Derived<Rational> {
  return notAboveZero({ deviation }) ?? derived(divide(absolute(subtract(mean, backgroundMean)), deviation));
}

/** A rectangle of linear grey values, row by row. */
export interface Region {
  readonly widthPx: number;
  readonly values: readonly number[];
  /** Grey value from which the detector is full; values at or above it are refused. */
  readonly fullFrom?: number;
}

export interface RegionSignal {
  readonly mean: number;
  /** Standard deviation about the plane that follows the thickness. */
  readonly deviation: number;
  readonly signalToNoise: number;
  /** Slope of the plane over the whole region, as a share of the mean. */
  readonly slope: number;
}

// 20 × 55 pixels: the least region on which a noise figure counts (ASTM E2446, from memory).
const LEAST_PIXELS = 1100;

function heightOf(region: Region): Derived<number> {
  const { widthPx, values, fullFrom } = region;
  const height = values.length / widthPx;
  if (!Number.isInteger(widthPx) || widthPx < 2 || !Number.isInteger(height) || height < 2)
    return refused('region-not-a-rectangle');
  if (values.length < LEAST_PIXELS) return refused('region-too-small', { pixels: values.length, needed: LEAST_PIXELS });
  if (values.some((value) => !Number.isFinite(value))) return refused('grey-value-missing');
  if (fullFrom !== undefined && values.some((value) => value >= fullFrom)) return refused('region-saturated', { fullFrom });
  return derived(height);
}

/**
 * Signal and noise of a region on a part whose thickness slopes: the noise is taken about the least-squares plane through the
 * grey values, not about their mean, which would count the slope as noise. Refuses regions that are no rectangle, of fewer
 * than 1100 pixels, saturated, dark or without any noise. Source: ASTM E2446 and E2698 for the ratio; plane by least squares.
 */
export function regionSignal(region: Region): Derived<RegionSignal> {
  const height = heightOf(region);
  if (!height.ok) return height;
  const { widthPx, values } = region;
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const across = (place: number) => (place % widthPx) - (widthPx - 1) / 2;
  const down = (place: number) => Math.floor(place / widthPx) - (height.value - 1) / 2;
  // Centred coordinates of a full grid are square to each other, so each slope stands alone.
  const sums = values.reduce(
    (sum, value, place) => {
      const [x, y] = [across(place), down(place)];
      return { x: sum.x + x * (value - mean), y: sum.y + y * (value - mean), xx: sum.xx + x * x, yy: sum.yy + y * y };
    },
    { x: 0, y: 0, xx: 0, yy: 0 },
  );
  const [slopeX, slopeY] = [sums.x / sums.xx, sums.y / sums.yy];
  const squares = values.reduce((sum, value, place) => {
    const rest = value - mean - slopeX * across(place) - slopeY * down(place);
    return sum + rest * rest;
  }, 0);
  const deviation = Math.sqrt(squares / (values.length - 3));
  if (!(mean > 0)) return refused('region-without-signal');
  // Rounding alone leaves about 10⁻¹⁵ of the mean.
  if (deviation <= mean * 1e-12) return refused('region-without-noise');
  const rise = Math.sqrt((slopeX * widthPx) ** 2 + (slopeY * height.value) ** 2);
  return derived({ mean, deviation, signalToNoise: mean / deviation, slope: rise / mean });
}

/** The middle of the SNRs of single rows: a second road to the same figure on a slope across the rows. Refuses as above. */
export function medianRowSignalToNoise(region: Region): Derived<number> {
  const height = heightOf(region);
  if (!height.ok) return height;
  const ratios: number[] = [];
  for (let row = 0; row < height.value; row += 1) {
    const values = region.values.slice(row * region.widthPx, (row + 1) * region.widthPx);
    const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
    const deviation = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) * (value - mean), 0) / (values.length - 1));
    if (!(mean > 0)) return refused('region-without-signal');
    if (deviation <= mean * 1e-12) return refused('region-without-noise');
    ratios.push(mean / deviation);
  }
  ratios.sort((a, b) => a - b);
  const middle = Math.floor(ratios.length / 2);
  const upper = ratios[middle] ?? 0;
  return derived(ratios.length % 2 === 1 ? upper : (upper + (ratios[middle - 1] ?? 0)) / 2);
}
