import type { GreyLevel } from './packed-pixels';
import type { Viewport } from './viewport';

/** What a monitor is to show of a picture; stored pixels are never altered. */
export interface GreyView {
  readonly viewport: Viewport;
  /** Stored values shown black and white. */
  readonly low: number;
  readonly high: number;
  readonly invert: boolean;
  readonly devicePixelRatio: number;
}

export interface GreyPainter {
  readonly by: 'webgl2' | 'table';
  paint: (view: GreyView) => void;
  release: () => void;
}

/** The smallest level that still has a pixel for each screen pixel. */
export function levelFor(levels: readonly GreyLevel[], screenPixelsPerPixel: number): number {
  return Math.min(levels.length - 1, Math.max(0, Math.floor(Math.log2(1 / screenPixelsPerPixel))));
}
