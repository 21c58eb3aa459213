import type { Alignable } from './alignable';
import { StripSearch } from './strip-search';

/** The longest line of placed ones, and those of them in some line of at least `count`. */
export interface AlignmentFinding {
  readonly longest: number;
  readonly breaking: ReadonlySet<number>;
  /** Whether the steps allowed were enough; if not the rest means nothing. */
  readonly finished: boolean;
}

/** Positions that hang together by links, each list rising. */
export function hangingTogether(links: Alignable['links']): readonly (readonly number[])[] {
  const seen = new Set<number>();
  const parts: number[][] = [];
  links.forEach((_, start) => {
    if (seen.has(start)) return;
    const part: number[] = [];
    const open = [start];
    seen.add(start);
    for (let at = open.pop(); at !== undefined; at = open.pop()) {
      part.push(at);
      for (const link of links[at] ?? []) {
        if (seen.has(link.to)) continue;
        seen.add(link.to);
        open.push(link.to);
      }
    }
    parts.push(part.sort((a, b) => a - b));
  });
  return parts;
}

/**
 * The longest line-up within any closed strip of `stripWidth` (µm, with half a rounding step), in any direction. A line-up holds in
 * a range of directions that ends where a place leaves the strip or two neighbours change order; between such directions nothing
 * changes, so one look between each two is enough, with the strip's lower border through each place in turn.
 */
export function longestAlignment(field: Alignable, stripWidth: number, count: number, stepsAllowed: number): AlignmentFinding {
  let longest = 0;
  let steps = 0;
  const breaking = new Set<number>();
  for (const part of hangingTogether(field.links)) {
    longest = Math.max(longest, 1);
    if (part.length === 1) continue;
    const search = new StripSearch(part, field, stripWidth, count);
    for (let anchor = 0; anchor < part.length && !search.exhausted; anchor++) {
      steps += search.turnAbout(anchor, stepsAllowed - steps);
      if (steps > stepsAllowed) return { longest: 0, breaking, finished: false };
    }
    longest = Math.max(longest, search.longest);
    for (const position of search.breakingPositions()) breaking.add(position);
  }
  return { longest, breaking, finished: true };
}
