import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  closedPath,
  formOf,
  isAccepted,
  isClosed,
  labelPoint,
  largeProfile,
  mostSmallSegments,
  requirementStates,
  ringShapes,
  smallProfile,
} from '../../components/ui/ring-geometry';
import type { RequirementState } from '../../components/ui/ring-geometry';
import { collapse, countStates, ringCounts, stageState, sumSegments } from '../../components/ui/ring-summary';

const anyState = fc.constantFrom(...requirementStates);
const segments = (states: readonly RequirementState[], stageOf?: (index: number) => string) =>
  states.map((state, index) => ({ key: `${index}`, title: `${index}`, state, ...(stageOf ? { stage: stageOf(index) } : {}) }));

/** Radii of the points that a path visits, measured from the middle of the box. */
function radii(path: string): number[] {
  return [...path.matchAll(/(-?[\d.]+) (-?[\d.]+)(?=[A-Z]|$)/g)].map(([, x, y]) => Math.hypot(Number(x) - 50, Number(y) - 50));
}

function extent(state: RequirementState): { inner: number; outer: number } {
  const [shape] = ringShapes([{ state }, { state: 'open' }, { state: 'open' }]);
  const found = radii(shape?.path ?? '');
  return { inner: Math.min(...found), outer: Math.max(...found) };
}

describe('a segment is told by its form', () => {
  it('draws full width for every way of being accepted, waived included', () => {
    const full = requirementStates.filter((state) => formOf(state) === 'full');
    expect(full).toEqual(['met', 'met-by-sample', 'met-by-ancestor', 'met-by-outside-certificate', 'waived']);
    expect(full.every(isAccepted)).toBe(true);
  });

  it('draws open thin, in work half as wide as accepted', () => {
    const width = (state: RequirementState) => extent(state).outer - extent(state).inner;
    expect(width('met')).toBeCloseTo(largeProfile.band, 1);
    expect(width('in-work')).toBeCloseTo(width('met') / 2, 1);
    expect(width('open')).toBeLessThan(width('met') / 6);
  });

  it('moves what awaits a decision outward, beyond every other segment', () => {
    const others = requirementStates.filter((state) => state !== 'awaiting-decision').map((state) => extent(state).outer);
    expect(extent('awaiting-decision').outer).toBeGreaterThan(Math.max(...others) + 4);
  });

  it('cuts a notch into what is rejected: one more point, between the edges', () => {
    const [rejected, met] = ringShapes([{ state: 'rejected' }, { state: 'met' }]);
    expect(radii(rejected?.path ?? '')).toHaveLength(radii(met?.path ?? '').length + 3);
    const between = radii(rejected?.path ?? '').filter(
      (radius) => radius > largeProfile.outer - largeProfile.band + 1 && radius < largeProfile.outer - 1,
    );
    expect(between).toHaveLength(1);
  });

  it('gives what is to be repeated a tick that an open segment has not', () => {
    const [repeated, open] = ringShapes([{ state: 'to-be-repeated' }, { state: 'open' }]);
    expect(repeated?.form).toBe('ticked');
    expect((repeated?.path.match(/M/g) ?? []).length).toBe((open?.path.match(/M/g) ?? []).length + 1);
  });

  it('has no two states of different meaning in one form', () => {
    const meanings = requirementStates.filter((state) => !isAccepted(state)).map(formOf);
    expect(new Set(meanings).size).toBe(meanings.length);
  });
});

describe('the ring as a whole', () => {
  it('goes clockwise from twelve in route order', () => {
    const middles = ringShapes(segments(['met', 'open', 'open', 'met'])).map(({ middleDeg }) => middleDeg);
    expect(middles).toEqual([45, 135, 225, 315]);
    // Three o'clock is to the right of the middle (screen y grows downward).
    expect(labelPoint(90, 40)).toEqual({ x: 90, y: 50 });
    expect(labelPoint(0, 40)).toEqual({ x: 50, y: 10 });
  });

  it('never overlaps its neighbours and stays in the box, whatever the route', () => {
    fc.assert(
      fc.property(
        fc.array(anyState, { minLength: 1, maxLength: 60 }),
        fc.constantFrom(largeProfile, smallProfile),
        (states, profile) => {
          const shapes = ringShapes(segments(states), profile);
          expect(shapes).toHaveLength(states.length);
          for (const { path } of shapes) {
            expect(path).not.toMatch(/NaN|Infinity/);
            for (const radius of radii(path)) expect(radius).toBeLessThanOrEqual(50.5);
          }
          const middles = shapes.map(({ middleDeg }) => middleDeg);
          expect(middles).toEqual([...middles].sort((a, b) => a - b));
        },
      ),
    );
  });

  it('closes exactly when there are requirements and each is accepted', () => {
    expect(isClosed([])).toBe(false);
    fc.assert(
      fc.property(fc.array(anyState, { minLength: 1, maxLength: 30 }), (states) => {
        expect(isClosed(segments(states))).toBe(states.every((state) => ringCounts({ [state]: 1 }).accepted === 1));
      }),
    );
    expect(new Set(radii(closedPath(largeProfile)).map((radius) => radius.toFixed(1)))).toEqual(new Set(['43.0', '30.0']));
  });

  it('draws a route of one requirement all the way round', () => {
    for (const state of requirementStates) {
      const [shape] = ringShapes([{ state }]);
      const places = [...(shape?.path ?? '').matchAll(/(-?[\d.]+) (-?[\d.]+)(?=[A-Z]|$)/g)].map(([, , y]) => Number(y));
      // From above the middle to below it: the path passes six o'clock as well as twelve.
      expect(Math.min(...places), state).toBeLessThan(25);
      expect(Math.max(...places), state).toBeGreaterThan(75);
    }
  });

  it('draws nothing for a route without requirements', () => {
    expect(ringShapes([])).toEqual([]);
  });
});

describe('a small ring', () => {
  it('keeps up to fourteen segments as they are', () => {
    expect(collapse(segments(Array<RequirementState>(14).fill('met')))).toHaveLength(14);
  });

  it('joins neighbours of one stage above fourteen, as wide as what they stand for', () => {
    const states = Array<RequirementState>(15).fill('met');
    states[14] = 'rejected';
    const joined = collapse(segments(states, (index) => `stage ${Math.floor(index / 5)}`));
    expect(joined).toEqual([
      { state: 'met', weight: 5 },
      { state: 'met', weight: 5 },
      { state: 'rejected', weight: 5 },
    ]);
  });

  it('never loses a requirement, hides a rejection or closes an unfinished ring', () => {
    fc.assert(
      fc.property(fc.array(anyState, { minLength: 1, maxLength: 80 }), (states) => {
        const joined = collapse(segments(states));
        expect(joined.length).toBeLessThanOrEqual(mostSmallSegments);
        expect(joined.reduce((sum, { weight }) => sum + weight, 0)).toBe(states.length);
        expect(joined.some(({ state }) => state === 'rejected')).toBe(states.includes('rejected'));
        expect(isClosed(joined)).toBe(isClosed(segments(states)));
      }),
    );
  });

  it.each([
    [['met', 'rejected', 'awaiting-decision'], 'rejected'],
    [['met', 'awaiting-decision', 'in-work'], 'awaiting-decision'],
    [['to-be-repeated', 'in-work'], 'to-be-repeated'],
    [['met', 'open'], 'in-work'],
    [['met', 'waived'], 'met'],
    [['open', 'open'], 'open'],
  ] as const)('%s is shown as %s', (states, expected) => {
    expect(stageState(states)).toBe(expected);
  });
});

describe('the numbers it is read out with', () => {
  it('counts waived and every way of being met as accepted', () => {
    expect(ringCounts(countStates(segments(['met', 'waived', 'met-by-sample', 'open', 'awaiting-decision'])))).toEqual({
      total: 5,
      accepted: 3,
      inWork: 0,
      awaiting: 1,
      rejected: 0,
      toBeRepeated: 0,
      open: 1,
    });
  });

  it('sums a lot: one segment per kind of state, as wide as its share', () => {
    expect(sumSegments({ met: 7, waived: 1, open: 2 })).toEqual([
      { state: 'met', weight: 8 },
      { state: 'open', weight: 2 },
    ]);
    expect(sumSegments({ met: 99, rejected: 1 })).toEqual([
      { state: 'met', weight: 99 },
      { state: 'rejected', weight: 6 },
    ]);
    const [accepted] = ringShapes(sumSegments({ met: 3, open: 1 }));
    expect(accepted?.middleDeg).toBe(135);
  });
});
