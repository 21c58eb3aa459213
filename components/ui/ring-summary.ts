import { isAccepted, mostSmallSegments } from './ring-geometry';
import type { RequirementState, RingSegment } from './ring-geometry';

/** What a stage shows when its requirements differ: the worst news first. */
const newsFirst: readonly RequirementState[] = ['rejected', 'awaiting-decision', 'to-be-repeated', 'in-work'];

/** The one state of several requirements: the worst, else accepted when all are, else in work when some are, else open. */
export function stageState(states: readonly RequirementState[]): RequirementState {
  const worst = newsFirst.find((state) => states.includes(state));
  if (worst) return worst;
  const accepted = states.filter(isAccepted).length;
  if (accepted === states.length && accepted > 0) return 'met';
  return accepted > 0 ? 'in-work' : 'open';
}

function runsByStage(segments: readonly RingSegment[]): RingSegment[][] {
  const runs: RingSegment[][] = [];
  for (const segment of segments) {
    const last = runs.at(-1);
    if (last && segment.stage !== undefined && last[0]?.stage === segment.stage) last.push(segment);
    else runs.push([segment]);
  }
  return runs;
}

function evenRuns<T>(items: readonly T[], most: number): T[][] {
  const count = Math.min(most, items.length);
  return Array.from({ length: count }, (_, run) =>
    items.slice(Math.floor((run * items.length) / count), Math.floor(((run + 1) * items.length) / count)),
  );
}

/**
 * At most `most` segments for a small ring: neighbours of one stage become one, and where no stages are named
 * (or still too many) neighbours are joined evenly. Weights keep the angle each part of the route deserves.
 */
export function collapse(
  segments: readonly RingSegment[],
  most = mostSmallSegments,
): { state: RequirementState; weight: number }[] {
  if (segments.length <= most) return segments.map(({ state }) => ({ state, weight: 1 }));
  const stages = runsByStage(segments);
  const runs = stages.length <= most ? stages : evenRuns(stages, most).map((joined) => joined.flat());
  return runs.map((run) => ({ state: stageState(run.map(({ state }) => state)), weight: run.length }));
}

export type StateCounts = Partial<Record<RequirementState, number>>;

export interface RingCounts {
  total: number;
  accepted: number;
  inWork: number;
  awaiting: number;
  rejected: number;
  toBeRepeated: number;
  open: number;
}

export function countStates(segments: readonly { state: RequirementState }[]): StateCounts {
  const counts: StateCounts = {};
  for (const { state } of segments) counts[state] = (counts[state] ?? 0) + 1;
  return counts;
}

/** The numbers a ring is read out with. Waived and every way of being met count as accepted. */
export function ringCounts(counts: StateCounts): RingCounts {
  const entries = Object.entries(counts) as [RequirementState, number][];
  const of = (state: RequirementState) => counts[state] ?? 0;
  return {
    total: entries.reduce((sum, [, count]) => sum + count, 0),
    accepted: entries.filter(([state]) => isAccepted(state)).reduce((sum, [, count]) => sum + count, 0),
    inWork: of('in-work'),
    awaiting: of('awaiting-decision'),
    rejected: of('rejected'),
    toBeRepeated: of('to-be-repeated'),
    open: of('open'),
  };
}

/** No kind of state is drawn narrower than this share of the circle: one rejected of a hundred must be seen. */
const leastShare = 0.06;

/** The segments of a summed ring (a lot, a shipment): one per kind of state, as wide as its share, accepted first. */
export function sumSegments(counts: StateCounts): { state: RequirementState; weight: number }[] {
  const { total, accepted, inWork, awaiting, rejected, toBeRepeated, open } = ringCounts(counts);
  const shares: [RequirementState, number][] = [
    ['met', accepted],
    ['in-work', inWork],
    ['awaiting-decision', awaiting],
    ['rejected', rejected],
    ['to-be-repeated', toBeRepeated],
    ['open', open],
  ];
  return shares
    .filter(([, weight]) => weight > 0)
    .map(([state, weight]) => ({ state, weight: Math.max(weight, total * leastShare) }));
}
