import { derived, refused } from '../derived';
import type { Derived } from '../derived';
import { DUPLEX_WIRES_MM } from './indicator-tables';
import { extremeAbout } from './smooth-extremes';

/** Grey values along a line across a duplex wire gauge, averaged over its width, on linear grey values. */
export interface LineProfile {
  readonly values: readonly number[];
  /** Distance between samples at the gauge. */
  readonly stepMm: number;
  /** Whether the wires show darker or brighter than the ground. */
  readonly wires: 'darker' | 'brighter';
}

/** One pair as read: heights of both wires and of the valley between them above the local ground. */
export interface PairReading {
  readonly pair: number;
  readonly wireMm: number;
  readonly first: number;
  readonly second: number;
  readonly valley: number;
}

export interface PairsRead {
  readonly pairs: readonly PairReading[];
  /** Standard deviation of the ground beside the gauge. */
  readonly noise: number;
}

interface Run {
  start: number;
  end: number;
  most: number;
}

const WIRES_MM: readonly number[] = DUPLEX_WIRES_MM.map(Number);
const LEAST_SAMPLES = 100;
/** Share of the profile at each end that must be bare ground. */
const END_SHARE = 0.04;
/** A wire stands out of the ground by this many deviations and this share of the strongest. */
const OUT_OF_NOISE = 5;
const OUT_OF_STRONGEST = 0.03;
const CLEARLY = 1.6;

function meanOf(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

/** Heights above the straight ground through both ends, and the noise of the ends about it. */
function aboveGround({ values, wires }: LineProfile): { heights: number[]; noise: number } {
  const ends = Math.max(8, Math.floor(values.length * END_SHARE));
  const left = meanOf(values.slice(0, ends));
  const right = meanOf(values.slice(-ends));
  const [leftAt, rightAt] = [(ends - 1) / 2, values.length - 1 - (ends - 1) / 2];
  const sign = wires === 'darker' ? -1 : 1;
  const heights = values.map((value, at) => sign * (value - left - ((right - left) * (at - leftAt)) / (rightAt - leftAt)));
  const bare = [...heights.slice(0, ends), ...heights.slice(-ends)];
  return { heights, noise: Math.sqrt(bare.reduce((sum, rest) => sum + rest * rest, 0) / (bare.length - 2)) };
}

/** Stretches of samples above a threshold; those that hardly rise above it are noise on a flank. */
function runsAbove(heights: readonly number[], threshold: number): Run[] {
  const runs: Run[] = [];
  heights.forEach((height, at) => {
    if (!(height > threshold)) return;
    const last = runs.at(-1);
    if (last?.end === at - 1) Object.assign(last, { end: at, most: Math.max(last.most, height) });
    else runs.push({ start: at, end: at, most: height });
  });
  return runs.filter(({ most }) => most > CLEARLY * threshold);
}

/** Joins the runs of the two wires of each pair, the widest pair first: the second wire begins two diameters after the first. */
function pairedRuns(runs: readonly Run[], stepMm: number): Run[] {
  const pairs: Run[] = [];
  for (const run of runs) {
    const open = pairs.at(-1);
    const wire = WIRES_MM[pairs.length - 1];
    if (open && wire !== undefined && (run.start - open.start) * stepMm < 2.6 * wire) open.end = run.end;
    else pairs.push({ ...run });
  }
  return pairs;
}

/** The ground of a gap: the mean of its middle half. */
function groundOf(heights: readonly number[], from: number, to: number): number {
  const quarter = Math.floor((to - from) / 4);
  return meanOf(heights.slice(from + quarter, Math.max(to - quarter, from + quarter + 1)));
}

/** Heights of one pair above the ground of the gaps on its two sides. */
function readPair(heights: readonly number[], pairs: readonly Run[], place: number, wire: number) {
  const { start, end } = pairs[place] ?? { start: 0, end: 0 };
  const before = groundOf(heights, (pairs[place - 1]?.end ?? -1) + 1, start);
  const after = groundOf(heights, end + 1, pairs[place + 1]?.start ?? heights.length);
  const above = heights.map((height) => height - (before + after) / 2);
  const inside = above.slice(start, end + 1);
  const middle =
    start + inside.reduce((sum, height, at) => sum + at * height, 0) / inside.reduce((sum, height) => sum + height, 0);
  return {
    first: extremeAbout(above, middle - wire, wire / 2).most,
    second: extremeAbout(above, middle + wire, wire / 2).most,
    valley: extremeAbout(above, middle, wire / 2).least,
  };
}

/**
 * Finds the wire pairs of a duplex gauge on a profile that begins and ends on bare ground and runs from the widest pair.
 * Refuses too few samples, flat profiles, and stretches that do not have a gauge's shape.
 * Source: geometry of ISO 19232-5 (gap = diameter = two, three diameters across a pair).
 */
export function readDuplexPairs(profile: LineProfile): Derived<PairsRead> {
  const { values, stepMm } = profile;
  if (values.length < LEAST_SAMPLES) return refused('profile-too-short', { samples: values.length, needed: LEAST_SAMPLES });
  if (!(stepMm > 0) || values.some((value) => !Number.isFinite(value))) return refused('profile-not-numbers');
  const { heights, noise } = aboveGround(profile);
  const strongest = heights.reduce((most, height) => Math.max(most, height), 0);
  if (!(strongest > 0) || strongest < 4 * OUT_OF_NOISE * noise) return refused('duplex-contrast-low', { pair: 1 });
  const runs = runsAbove(heights, Math.max(OUT_OF_NOISE * noise, OUT_OF_STRONGEST * strongest));
  const paired = pairedRuns(runs, stepMm).slice(0, WIRES_MM.length);
  const extents = paired.map(({ start, end }) => (end - start + 1) * stepMm);
  const spread = Math.max(0, (extents[0] ?? 0) - 3 * (WIRES_MM[0] ?? 0));
  const strange = extents.findIndex((extent, place) => {
    const across = 3 * (WIRES_MM[place] ?? 0);
    return extent > across + 1.5 * spread + 3 * stepMm || (place < 3 && extent < 0.75 * across);
  });
  if (strange >= 0) return refused('gauge-not-recognised', { pair: strange + 1 });
  return derived({
    noise,
    pairs: paired.map((_, place) => ({
      pair: place + 1,
      wireMm: WIRES_MM[place] ?? 0,
      ...readPair(heights, paired, place, (WIRES_MM[place] ?? 0) / stepMm),
    })),
  });
}
