import fc from 'fast-check';
import { expect, test } from 'vitest';
import { compare, multiply, ratio, rationalOf } from '@/services/engine/quantity/decimal';
import { angleDegrees, exponential, naturalLog, sineAndCosine } from '@/services/engine/quantity/elementary';
import { powerOf, rootOf, squareRoot } from '@/services/engine/quantity/roots';

const runs = { numRuns: 5000 };
const near = (value: number, expected: number) => {
  expect(Math.abs(value - expected)).toBeLessThan(4e-15 * Math.max(1, Math.abs(expected)));
};

// The platform's own functions are the outside judge here: good to a few units in the last place, if not reproducible.
test('logarithm and exponential agree with the platform', () => {
  fc.assert(
    fc.property(fc.double({ min: 1e-12, max: 1e12, noNaN: true }), (value) => near(naturalLog(value), Math.log(value))),
    runs,
  );
  fc.assert(
    fc.property(fc.double({ min: -20, max: 20, noNaN: true }), (power) => {
      expect(Math.abs(exponential(power) / Math.exp(power) - 1)).toBeLessThan(1e-13);
    }),
    runs,
  );
  expect(() => naturalLog(0)).toThrow(RangeError);
  expect(() => exponential(1e4)).toThrow(RangeError);
});

test('angles agree with the platform, and are exact on the axes', () => {
  const coordinate = fc.double({ min: -1e6, max: 1e6, noNaN: true });
  fc.assert(
    fc.property(coordinate, coordinate, (y, x) => {
      fc.pre(Math.abs(x) > 1e-200 || Math.abs(y) > 1e-200);
      const expected = (Math.atan2(y + 0, x) * 180) / Math.PI;
      expect(Math.abs(angleDegrees(y, x) - expected)).toBeLessThan(1e-12);
    }),
    runs,
  );
  fc.assert(
    fc.property(fc.double({ min: -720, max: 720, noNaN: true }), (degrees) => {
      const { sine, cosine } = sineAndCosine(degrees);
      expect(Math.abs(sine - Math.sin((degrees * Math.PI) / 180))).toBeLessThan(2e-14);
      expect(Math.abs(cosine - Math.cos((degrees * Math.PI) / 180))).toBeLessThan(2e-14);
    }),
    runs,
  );
  expect([angleDegrees(0, 1), angleDegrees(1, 0), angleDegrees(0, -1), angleDegrees(-1, 0)]).toEqual([0, 90, 180, -90]);
  expect(sineAndCosine(90).sine).toBe(1);
  expect(Math.abs(sineAndCosine(90).cosine)).toBe(0);
});

test('a root lies between its digits, and is exact where it can be', () => {
  const step = ratio(1n, 10n ** 40n);
  fc.assert(
    fc.property(
      fc.bigInt({ min: 0n, max: 10n ** 18n }),
      fc.bigInt({ min: 1n, max: 10n ** 9n }),
      fc.integer({ min: 2, max: 7 }),
      (n, d, degree) => {
        const of = ratio(n, d);
        const root = rootOf(of, degree);
        expect(compare(powerOf(root, degree), of)).toBeLessThanOrEqual(0);
        expect(compare(powerOf({ n: root.n + 1n, d: root.d }, degree), of)).toBe(1);
        expect(root.d).toBe(step.d);
      },
    ),
    { numRuns: 1000 },
  );
  expect(compare(squareRoot(rationalOf('2.25')), rationalOf('1.5'))).toBe(0);
  expect(compare(rootOf(multiply(ratio(27n), ratio(1n, 8n)), 3), rationalOf('1.5'))).toBe(0);
  expect(() => squareRoot(ratio(-1n))).toThrow(RangeError);
});
