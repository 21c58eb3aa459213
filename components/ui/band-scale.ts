/** A reading's band as decimal strings; a limit that does not exist is absent. */
export interface Band {
  lower?: string;
  upper?: string;
  nominal?: string;
  /** Width of the guard band w, taken from each limit inward. */
  guardBand?: string;
  value?: string;
  /** Expanded uncertainty U of the reading. */
  uncertainty?: string;
}

/** Where everything stands on a line from 0 to 1; for drawing only, never for judging. */
export interface BandScale {
  lower: number | undefined;
  upper: number | undefined;
  nominal: number | undefined;
  guardLower: number | undefined;
  guardUpper: number | undefined;
  value: number | undefined;
  whisker: readonly [number, number] | undefined;
  /** The value lies outside what is drawn. */
  beyond: 'below' | 'above' | undefined;
}

function toNumber(text: string | undefined): number | undefined {
  if (text === undefined) return undefined;
  const value = Number(text);
  return Number.isFinite(value) ? value : undefined;
}

/** The drawn range: both limits with 40 % of the band on either side; with one limit, room for the value. */
function range(
  lower: number | undefined,
  upper: number | undefined,
  value: number | undefined,
  uncertainty: number,
): [number, number] {
  if (lower !== undefined && upper !== undefined && upper > lower) {
    const margin = (upper - lower) * 0.4;
    return [lower - margin, upper + margin];
  }
  const limit = lower ?? upper ?? value ?? 0;
  const reach = Math.max(Math.abs((value ?? limit) - limit) * 1.3, uncertainty * 2.5, Math.abs(limit) * 0.1, 1e-9);
  return [limit - reach, limit + reach];
}

const clamp = (share: number) => Math.max(0, Math.min(1, share));

/** Places a band on a line from 0 to 1. */
export function bandScale(band: Band): BandScale {
  const lower = toNumber(band.lower);
  const upper = toNumber(band.upper);
  const value = toNumber(band.value);
  const guard = toNumber(band.guardBand) ?? 0;
  const uncertainty = toNumber(band.uncertainty) ?? 0;
  const nominal = toNumber(band.nominal);
  const [from, to] = range(lower, upper, value, uncertainty);
  const place = (at: number | undefined) => (at === undefined ? undefined : clamp((at - from) / (to - from)));
  return {
    lower: place(lower),
    upper: place(upper),
    nominal: place(nominal),
    guardLower: lower === undefined || guard === 0 ? undefined : place(lower + guard),
    guardUpper: upper === undefined || guard === 0 ? undefined : place(upper - guard),
    value: place(value),
    whisker:
      value === undefined || uncertainty === 0 ? undefined : [place(value - uncertainty) ?? 0, place(value + uncertainty) ?? 1],
    beyond: value === undefined ? undefined : value < from ? 'below' : value > to ? 'above' : undefined,
  };
}
