import { derived, refused } from '../derived';
import type { Derived } from '../derived';
import { readDuplexPairs } from './duplex-pairs';
import type { LineProfile, PairReading, PairsRead } from './duplex-pairs';

/** A pair counts as resolved while its dip is at least this many percent. */
const RESOLVED_PERCENT = 20;
/** Deviations of the ground that the wires of the pairs used must stand above it. */
const LEAST_CONTRAST = 20;
/** How much the two wires of a pair may differ, as a share of the higher. */
const MOST_UNEVEN = 0.35;
/** By how many percent a dip may stand above that of the wider pair before it. */
const MOST_RISE = 10;

/**
 * Dip of a pair in %: 100·(A + B − 2C)/(A + B), wires A and B and valley C above the ground. Refuses wires not above the ground.
 * Source: ISO 19232-5, ASTM E2002.
 */
export function dipPercent(first: number, second: number, valley: number): Derived<number> {
  if (!(first > 0 && second > 0)) return refused('wires-not-above-ground');
  return derived((100 * (first + second - 2 * valley)) / (first + second));
}

export interface DuplexResolution {
  /** Number of the first pair with a dip below 20 %. */
  readonly firstUnresolved: number;
  /** Its wire diameter: the basic spatial resolution as read. */
  readonly resolutionMm: number;
  /** Twice that: total unsharpness. */
  readonly unsharpnessMm: number;
  /** Where the dip crosses 20 % between the pairs. */
  readonly interpolatedMm: number;
  readonly dipsPercent: readonly number[];
}

interface Dip {
  readonly wireMm: number;
  readonly dip: number;
}

/** Where the parabola through three dips (or the line through two) crosses 20 % between the last two. */
function crossing(before: Dip | undefined, resolved: Dip, unresolved: Dip): number {
  // Newton's form about the unresolved pair: dip = y₀ + t·(slope + (t − width)·bend), t from the unresolved wire upwards.
  const width = resolved.wireMm - unresolved.wireMm;
  const slope = (resolved.dip - unresolved.dip) / width;
  const bend =
    before === undefined
      ? 0
      : ((before.dip - resolved.dip) / (before.wireMm - resolved.wireMm) - slope) / (before.wireMm - unresolved.wireMm);
  const need = RESOLVED_PERCENT - unresolved.dip;
  // bend·t² + (slope − bend·width)·t − need = 0. The ends lie on both sides of 20 %, so one root lies between them.
  const linear = slope - bend * width;
  const root = Math.sqrt(Math.max(0, linear * linear + 4 * bend * need));
  const t = linear + root > 0 ? (2 * need) / (linear + root) : need / slope;
  return unresolved.wireMm + Math.min(Math.max(t, 0), width);
}

function faultOfPair(reading: PairReading, noise: number) {
  const { first, second, pair } = reading;
  if ((first + second) / 2 < LEAST_CONTRAST * noise) return refused('duplex-contrast-low', { pair });
  const higher = Math.max(first, second);
  return (higher - Math.min(first, second)) / higher > MOST_UNEVEN ? refused('duplex-pair-uneven', { pair }) : null;
}

/** Dips up to the pair after the first unresolved one, or the refusal of the first pair that cannot be used. */
function dipsUntilUnresolved(pairs: readonly PairReading[], noise: number): Derived<readonly Dip[]> {
  const dips: Dip[] = [];
  for (const reading of pairs) {
    const bad = faultOfPair(reading, noise);
    if (bad) return bad;
    const dip = dipPercent(reading.first, reading.second, reading.valley);
    if (!dip.ok) return dip;
    const previous = dips.at(-1);
    if (previous && dip.value > previous.dip + MOST_RISE) return refused('duplex-dips-rise', { pair: reading.pair });
    dips.push({ wireMm: reading.wireMm, dip: dip.value });
    if (dip.value < RESOLVED_PERCENT) break;
  }
  return derived(dips);
}

/** Reads the gauge from its wide end, whichever end of the line that is. */
function readEitherWay(profile: LineProfile): Derived<PairsRead> {
  const forward = readDuplexPairs(profile);
  if (forward.ok || forward.fault.code !== 'gauge-not-recognised') return forward;
  const backward = readDuplexPairs({ ...profile, values: [...profile.values].reverse() });
  return backward.ok ? backward : forward;
}

/**
 * Basic spatial resolution by duplex wires on a line profile: the first pair whose dip is below 20 %, and where the dip
 * crosses 20 % by a second-order polynomial through the pairs about it. Refuses profiles without a gauge, of low contrast,
 * sampled more coarsely than the wires they should tell apart, with uneven wires or rising dips, and gauges none or all of
 * whose pairs are resolved: a figure from those would be wrong, not merely rough.
 * Source: ISO 19232-5, ASTM E2002 (dip), ISO 17636-2 annex (interpolation; from memory).
 */
export function duplexResolution(profile: LineProfile): Derived<DuplexResolution> {
  const read = readEitherWay(profile);
  if (!read.ok) return read;
  const dips = dipsUntilUnresolved(read.value.pairs, read.value.noise);
  if (!dips.ok) return dips;
  const [resolved, unresolved] = [dips.value.at(-2), dips.value.at(-1)];
  if (!unresolved || unresolved.dip >= RESOLVED_PERCENT) return refused('duplex-all-resolved', { pairs: dips.value.length });
  if (!resolved) return refused('duplex-none-resolved');
  if (profile.stepMm > unresolved.wireMm)
    return refused('profile-too-coarse', { stepMm: profile.stepMm, wireMm: unresolved.wireMm });
  return derived({
    firstUnresolved: dips.value.length,
    resolutionMm: unresolved.wireMm,
    unsharpnessMm: 2 * unresolved.wireMm,
    interpolatedMm: crossing(dips.value.at(-3), resolved, unresolved),
    dipsPercent: dips.value.map(({ dip }) => dip),
  });
}
