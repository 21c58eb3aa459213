import fc from 'fast-check';
import { expect, test } from 'vitest';
import { longestAlignment } from '@/services/engine/indications/alignment';
import { heaviestWindow } from '@/services/engine/indications/windows';

interface Place {
  readonly x: number;
  readonly y: number;
}

// Half a rounding step, as the engine lays its windows: a place exactly on the border is inside.
const HALF_STEP = 0.0005;
const grid = fc.record({ x: fc.integer({ min: 0, max: 12 }), y: fc.integer({ min: 0, max: 12 }) });
const places = fc.array(grid, { minLength: 1, maxLength: 9 });

function subsets(count: number): number[][] {
  return Array.from({ length: 2 ** count - 1 }, (_, bits) =>
    Array.from({ length: count }, (__, at) => at).filter((at) => (bits + 1) & (1 << at)),
  );
}

/** Diameter of the smallest circle around places: over two of them or through three (brute force). */
function smallestCircle(list: readonly Place[]): number {
  let best = Infinity;
  const offer = (cx: number, cy: number, radius: number) => {
    if (list.every((p) => Math.hypot(p.x - cx, p.y - cy) <= radius + 1e-9)) best = Math.min(best, 2 * radius);
  };
  list.forEach((a, i) => {
    offer(a.x, a.y, 0);
    list.slice(i + 1).forEach((b, j) => {
      offer((a.x + b.x) / 2, (a.y + b.y) / 2, Math.hypot(a.x - b.x, a.y - b.y) / 2);
      for (const c of list.slice(i + j + 2)) {
        const d = 2 * (a.x * (b.y - c.y) + b.x * (c.y - a.y) + c.x * (a.y - b.y));
        if (d === 0) continue;
        const [sa, sb, sc] = [a, b, c].map((p) => p.x * p.x + p.y * p.y) as [number, number, number];
        const cx = (sa * (b.y - c.y) + sb * (c.y - a.y) + sc * (a.y - b.y)) / d;
        const cy = (sa * (c.x - b.x) + sb * (a.x - c.x) + sc * (b.x - a.x)) / d;
        offer(cx, cy, Math.hypot(a.x - cx, a.y - cy));
      }
    });
  });
  return best;
}

const spread = (list: readonly number[]) => Math.max(...list) - Math.min(...list);
const squareAround = (list: readonly Place[]) => Math.max(spread(list.map((p) => p.x)), spread(list.map((p) => p.y)));

test.each([
  ['circle', smallestCircle],
  ['square', squareAround],
] as const)(
  'the fullest %s is the largest subset that fits, and what breaks is the union of all that do',
  { timeout: 60_000 },
  (shape, around) => {
    fc.assert(
      fc.property(
        places,
        fc.integer({ min: 1, max: 15 }),
        fc.integer({ min: 0, max: 4 }),
        fc.boolean(),
        (list, size, allowed, weighed) => {
          const weights = list.map((_, at) => (weighed ? (at % 3) + 1 : 1));
          const sum = (subset: readonly number[]) => subset.reduce((total, at) => total + (weights[at] ?? 0), 0);
          const fitting = subsets(list.length).filter((subset) => around(subset.map((at) => list[at] ?? { x: 0, y: 0 })) <= size);
          const most = Math.max(...fitting.map(sum));
          const breaking = new Set(fitting.filter((subset) => sum(subset) > allowed).flat());
          const found = heaviestWindow(
            list.map((p, at) => ({ ...p, weight: weights[at] ?? 0 })),
            shape,
            size + HALF_STEP,
            allowed,
          );
          expect(found.most).toBe(most);
          expect([...found.breaking].sort()).toEqual([...breaking].sort());
        },
      ),
      { numRuns: 300 },
    );
  },
);

/** Whether a subset lines up: some direction in which it fits the width and follows on, tried at and beside every critical one. */
function linesUp(
  list: readonly Place[],
  links: readonly (readonly boolean[])[],
  subset: readonly number[],
  width: number,
): boolean {
  const at = (index: number) => list[index] ?? { x: 0, y: 0 };
  const angles: number[] = [];
  for (const i of subset) {
    for (const j of subset) {
      const [x, y] = [at(j).x - at(i).x, at(j).y - at(i).y];
      const distance = Math.hypot(x, y);
      if (distance === 0) continue;
      const towards = Math.atan2(y, x);
      angles.push(towards, towards + Math.PI / 2);
      if (distance >= width) angles.push(towards + Math.acos(width / distance), towards - Math.acos(width / distance));
    }
  }
  return angles.some((angle) =>
    // Beside it, not at it: places side by side take the order that turning the strip ever so little gives them.
    [-1e-6, 1e-6].some((aside) => {
      const [nx, ny] = [Math.cos(angle + aside), Math.sin(angle + aside)];
      if (spread(subset.map((i) => at(i).x * nx + at(i).y * ny)) > width + HALF_STEP) return false;
      const order = [...subset].sort((i, j) => at(i).y * nx - at(i).x * ny - (at(j).y * nx - at(j).x * ny));
      return order.slice(1).every((next, place) => links[order[place] ?? 0]?.[next]);
    }),
  );
}

test(
  'the longest line is the largest subset that lines up, and what breaks is the union of all long enough',
  { timeout: 60_000 },
  () => {
    const different = fc.uniqueArray(grid, { minLength: 2, maxLength: 7, selector: (p) => `${p.x} ${p.y}` });
    fc.assert(
      fc.property(
        different,
        fc.integer({ min: 1, max: 5 }),
        fc.integer({ min: 2, max: 9 }),
        fc.integer({ min: 2, max: 5 }),
        (list, width, gap, count) => {
          const linked = list.map((a) => list.map((b) => a !== b && Math.hypot(a.x - b.x, a.y - b.y) < gap));
          const lines = subsets(list.length).filter((subset) => subset.length === 1 || linesUp(list, linked, subset, width));
          const links = linked.map((row) => row.flatMap((yes, to) => (yes ? [{ to, bridges: 0 }] : [])));
          const found = longestAlignment({ places: list, links, spare: 0 }, width + HALF_STEP, count, Infinity);
          expect(found.longest).toBe(Math.max(...lines.map((subset) => subset.length)));
          const breaking = new Set(lines.filter((subset) => subset.length >= count).flat());
          expect([...found.breaking].sort()).toEqual([...breaking].sort());
        },
      ),
      { numRuns: 400 },
    );
  },
);
