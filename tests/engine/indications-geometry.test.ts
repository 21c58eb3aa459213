import fc from 'fast-check';
import { expect, test } from 'vitest';
import type { PointUm } from '@/services/engine/evaluate/types';
import { farthestBetween, leastWidth, piecesOf } from '@/services/engine/indications/geometry/calipers';
import { measuresOf, outlineOf } from '@/services/engine/indications/geometry/outline';
import type { DrawnShape } from '@/services/engine/indications/geometry/outline';
import { isSimple } from '@/services/engine/indications/geometry/polygon';
import { separationOf } from '@/services/engine/indications/geometry/separation';

const point = fc
  .tuple(fc.integer({ min: -2500, max: 2500 }), fc.integer({ min: -2500, max: 2500 }))
  .map(([x, y]): PointUm => [x, y]);
const size = fc.integer({ min: 1, max: 2400 });
const shape: fc.Arbitrary<DrawnShape> = fc.oneof(
  fc.record({ center: point, diameter: size }).map((rest) => ({ kind: 'circle' as const, ...rest })),
  fc
    .record({ center: point, axes: fc.tuple(size, size), angle: fc.double({ min: -400, max: 400, noNaN: true }) })
    .map((rest) => ({ kind: 'ellipse' as const, ...rest })),
  fc
    .tuple(point, point, point, fc.integer({ min: 1, max: 400 }))
    .filter(([a, b]) => a[0] !== b[0] || a[1] !== b[1])
    .map(([a, b, c, width]) => ({ kind: 'polyline' as const, points: [a, b, c], width })),
  fc
    .array(point, { minLength: 3, maxLength: 6 })
    .filter((points) => new Set(points.map(String)).size === points.length && isSimple(points))
    .map((points) => ({ kind: 'polygon' as const, points })),
);

type Vector = readonly [number, number];

/** Points on the border, at most about `STEP_UM` apart. */
const STEP_UM = 12;

function ring(center: PointUm, a: number, b: number, angleDeg: number): Vector[] {
  const turn = (angleDeg * Math.PI) / 180;
  const count = Math.ceil((Math.PI * 2 * Math.max(a, b)) / STEP_UM) + 8;
  return Array.from({ length: count }, (_, at) => {
    const t = (2 * Math.PI * at) / count;
    const [x, y] = [a * Math.cos(t), b * Math.sin(t)];
    return [center[0] + x * Math.cos(turn) - y * Math.sin(turn), center[1] + x * Math.sin(turn) + y * Math.cos(turn)];
  });
}

function along(a: PointUm, b: PointUm, aside: number): Vector[] {
  const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
  if (length === 0) return [];
  const [nx, ny] = [(-(b[1] - a[1]) / length) * aside, ((b[0] - a[0]) / length) * aside];
  const count = Math.ceil(length / STEP_UM);
  return Array.from({ length: count + 1 }, (_, at) => [
    a[0] + ((b[0] - a[0]) * at) / count + nx,
    a[1] + ((b[1] - a[1]) * at) / count + ny,
  ]);
}

function border(one: DrawnShape): Vector[] {
  if (one.kind === 'circle') return ring(one.center, one.diameter / 2, one.diameter / 2, 0);
  if (one.kind === 'ellipse') return ring(one.center, one.axes[0] / 2, one.axes[1] / 2, one.angle ?? 0);
  const corners = one.points;
  if (one.kind === 'polygon') return corners.flatMap((a, at) => along(a, corners[(at + 1) % corners.length] ?? a, 0));
  const radius = one.width / 2;
  const sides = corners
    .slice(1)
    .flatMap((b, at) => [...along(corners[at] ?? b, b, radius), ...along(corners[at] ?? b, b, -radius)]);
  return [...sides, ...corners.flatMap((corner) => ring(corner, radius, radius, 0))];
}

function holds(one: DrawnShape, [x, y]: Vector): boolean {
  if (one.kind === 'circle') return Math.hypot(x - one.center[0], y - one.center[1]) <= one.diameter / 2;
  if (one.kind === 'ellipse') {
    const turn = ((one.angle ?? 0) * Math.PI) / 180;
    const [dx, dy] = [x - one.center[0], y - one.center[1]];
    const u = (dx * Math.cos(turn) + dy * Math.sin(turn)) / (one.axes[0] / 2);
    const v = (dy * Math.cos(turn) - dx * Math.sin(turn)) / (one.axes[1] / 2);
    return u * u + v * v <= 1;
  }
  const { points } = one;
  if (one.kind === 'polygon') {
    return points.reduce((inside, [ax, ay], at) => {
      const [bx, by] = points[(at + 1) % points.length] ?? [ax, ay];
      return ay > y !== by > y && x < ((bx - ax) * (y - ay)) / (by - ay) + ax ? !inside : inside;
    }, false);
  }
  return points.slice(1).some(([bx, by], at) => {
    const [ax, ay] = points[at] ?? [bx, by];
    const [ex, ey] = [bx - ax, by - ay];
    const part = Math.max(0, Math.min(1, ((x - ax) * ex + (y - ay) * ey) / (ex * ex + ey * ey || 1)));
    return Math.hypot(x - ax - part * ex, y - ay - part * ey) <= one.width / 2;
  });
}

// Reference: dense sampling of the borders, written apart from the engine.
test(
  'separation lies within the sampling of the least distance between any two outlines, and is 0 when they overlap',
  { timeout: 60_000 },
  () => {
    fc.assert(
      fc.property(shape, shape, (one, other) => {
        const separation = separationOf(outlineOf(one), outlineOf(other));
        expect(separationOf(outlineOf(other), outlineOf(one))).toBeCloseTo(separation, 6);
        const [some, others] = [border(one), border(other)];
        if (some.some((p) => holds(other, p)) || others.some((p) => holds(one, p))) {
          expect(separation).toBe(0);
          return;
        }
        let least = Infinity;
        for (const [px, py] of some) for (const [qx, qy] of others) least = Math.min(least, (px - qx) ** 2 + (py - qy) ** 2);
        expect(separation).toBeLessThanOrEqual(Math.sqrt(least) + 1e-6);
        expect(separation).toBeGreaterThan(Math.sqrt(least) - STEP_UM);
      }),
      { numRuns: 150 },
    );
  },
);

/** Caps of which the sampling misses more than half a micrometre: the exact length is 2·26 + √(286² + 973²) µm. */
const cutShort: [DrawnShape, DrawnShape] = [
  { kind: 'ellipse', center: [0, 0], axes: [1, 1], angle: 0 },
  {
    kind: 'polyline',
    points: [
      [-145, 0],
      [141, 973],
      [0, 0],
    ],
    width: 52,
  },
];

test('calipers of a union agree with sampling in 720 directions', { timeout: 60_000 }, () => {
  fc.assert(
    fc.property(shape, shape, (one, other) => {
      const [some, others] = [piecesOf(outlineOf(one)), piecesOf(outlineOf(other))];
      const length = farthestBetween(some, others, Math.max(measuresOf(one).length, measuresOf(other).length));
      const width = leastWidth([...some, ...others]);
      const all = [...border(one), ...border(other)];
      let most = 0;
      let least = Infinity;
      for (let step = 0; step < 720; step++) {
        const [cos, sin] = [Math.cos((Math.PI * step) / 720), Math.sin((Math.PI * step) / 720)];
        let [low, high] = [Infinity, -Infinity];
        for (const [x, y] of all) {
          low = Math.min(low, x * cos + y * sin);
          high = Math.max(high, x * cos + y * sin);
        }
        most = Math.max(most, high - low);
        least = Math.min(least, high - low);
      }
      expect(length).toBeGreaterThan(most - 1e-6);
      // A sampled ring is cut short by r·(1 − cos(π/count)), at most 0.29 µm (near r = 15 µm), at either end.
      expect(length).toBeLessThan(most + 0.6);
      expect(width).toBeLessThan(least + 0.6);
      // Between two sampled directions 0.25° apart the width falls by at most the length times that angle.
      expect(width).toBeGreaterThan(least - (length * Math.PI) / 720 - 0.6);
    }),
    { numRuns: 150, examples: [cutShort] },
  );
});

test.each([
  // Worked by hand: rectangle 3 by 4 with diagonal 5; right-angled triangle of height 12·5/13; a line with round ends.
  [
    {
      kind: 'polygon',
      points: [
        [0, 0],
        [3000, 0],
        [3000, 4000],
        [0, 4000],
      ],
    },
    5000,
    3000,
  ],
  [
    {
      kind: 'polygon',
      points: [
        [0, 0],
        [12000, 0],
        [0, 5000],
      ],
    },
    13000,
    (12000 * 5000) / 13000,
  ],
  [
    {
      kind: 'polyline',
      points: [
        [0, 0],
        [3000, 4000],
      ],
      width: 200,
    },
    5200,
    200,
  ],
  [
    {
      kind: 'polygon',
      points: [
        [-100000000, -100000000],
        [100000000, 100000000],
        [99999999, 100000000],
      ],
    },
    Math.SQRT2 * 2e8,
    1 / Math.SQRT2,
  ],
] as const)('length and width of %j', (one, length, width) => {
  const measures = measuresOf(one);
  expect(measures.length).toBeCloseTo(length, 4);
  expect(measures.width).toBeCloseTo(width, 4);
});

test('whether a polygon crosses itself is decided exactly at the ends of the range', { timeout: 60_000 }, () => {
  const far = 100_000_000;
  expect(
    isSimple([
      [-far, -far],
      [far, far - 1],
      [far, far],
      [0, 0],
    ]),
  ).toBe(true);
  expect(
    isSimple([
      [-far, -far],
      [far, far],
      [far, far - 1],
      [0, 0],
    ]),
  ).toBe(false);
  expect(
    isSimple([
      [0, 0],
      [10, 0],
      [10, 10],
      [5, 0],
    ]),
  ).toBe(false);
  expect(
    isSimple([
      [0, 0],
      [10, 0],
      [5, 0],
    ]),
  ).toBe(false);
  expect(
    isSimple([
      [0, 0],
      [10, 10],
      [10, 0],
      [0, 10],
    ]),
  ).toBe(false);
});
