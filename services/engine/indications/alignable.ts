import type { Vector } from './geometry/points';

/** Two places near enough to follow each other in a line; `bridges` unplaced ones are needed between them (0: none). */
export interface Link {
  readonly to: number;
  readonly bridges: number;
}

/** Centroids (µm, differences to one of them) and which may follow which. */
export interface Alignable {
  readonly places: readonly Vector[];
  readonly links: readonly (readonly Link[])[];
  /** How many unplaced ones may be put between or at the ends. */
  readonly spare: number;
}
