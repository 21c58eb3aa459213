import fc from 'fast-check';
import { expect, test } from 'vitest';
import type { Characteristic, Reading } from '@/services/engine/evaluate/types';
import { compare, decimalText, rationalOf, ratio, roundHalfEven } from '@/services/engine/quantity/decimal';
import { convertValue, unitOf } from '@/services/engine/quantity/units';
import type { Unit } from '@/services/engine/quantity/units';
import { judgeReading } from '@/services/engine/readings/judge-reading';
import { standardNormal } from '@/services/engine/readings/normal-distribution';
import { scaleOf } from '@/services/engine/readings/reading-scale';
import decisions from '../vectors/readings-decision-rules.json';
import jcgm from '../vectors/readings-jcgm106.json';

function judge(characteristic: Partial<Characteristic>, value: string, reading: Partial<Reading> = {}) {
  const whole: Characteristic = { number: '1', unit: 'mm', decision: { rule: 'simple' }, ...characteristic };
  const given: Reading = { characteristic: '1', value, unit: 'mm', ...reading };
  const scale = scaleOf(whole, given);
  if (scale === null) throw new Error('units do not fit');
  return judgeReading(whole, given, scale);
}
const unit = (symbol: string): Unit => {
  const found = unitOf(symbol);
  if (!found) throw new Error(symbol);
  return found;
};
const text = (n: number | null | undefined) => (n === null || n === undefined ? undefined : String(n));
const WORDS: Record<string, string> = { pass: 'accept', fail: 'reject', inconclusive: 'indeterminate' };

// JCGM 106:2012 clause 7 rules, ILAC-G8:09/2019 (w = U, k = 2), ISO 14253-1:2017 (w = 1.65 u); values computed independently.
test.each(decisions.cases)('decision rules: $case', (one) => {
  const limits = { lower: text(one.TL), upper: text(one.TU) };
  const uncertainty = { expanded: text(2 * one.u) ?? '', k: '2' };
  const guarded = (g: string) => ({ ...limits, decision: { rule: 'guarded', form: 'non-binary', g } as const });
  expect(judge(limits, String(one.y), { uncertainty }).verdict).toBe(WORDS[one.simple]);
  expect(judge(guarded('1'), String(one.y), { uncertainty }).verdict).toBe(WORDS[one.guard_w_2u]);
  const iso = judge(guarded('0.825'), String(one.y), { uncertainty });
  expect(iso.verdict).toBe(WORDS[one['guard_w_1.65u_ISO14253-1_2017']]);
  expect(iso.conformanceProbability).toBeCloseTo(one.pc, 7);
});

// JCGM 106:2012 7.3 and 7.4 worked examples (inputs from memory, results recomputed).
test.each(jcgm.examples.filter((one) => one.pc !== undefined))('JCGM 106 $id', (one) => {
  const limits = { lower: text(one.TL), upper: text(one.TU) };
  expect(judge(limits, String(one.y), { uncertainty: { expanded: String(one.u), k: '1' } }).conformanceProbability).toBeCloseTo(
    one.pc ?? 0,
    7,
  );
});

// Upper tail of the standard normal, tables to 10 digits (Abramowitz and Stegun table 26.1 and 26.2, from memory).
test.each([
  [0, 0.5],
  [-1, 0.15865525393145705],
  [-2, 0.02275013194817921],
  [-3, 0.0013498980316300946],
  [-6, 9.865876450376981e-10],
  [-8, 6.22096057427178e-16],
])('Φ(%d)', (z, expected) => {
  expect(Math.abs(standardNormal(z) / expected - 1)).toBeLessThan(1e-12);
  expect(Math.abs(standardNormal(-z) - (1 - expected))).toBeLessThan(1e-12);
});

test('a value on the limit conforms in any entry unit', () => {
  expect(judge({ upper: '1.15' }, '1.15').verdict).toBe('accept');
  expect(judge({ upper: '25.4' }, '1', { unit: 'in' }).verdict).toBe('accept');
  expect(judge({ upper: '25.4' }, '1.0000000000000001', { unit: 'in' }).verdict).toBe('reject');
});

// ASTM E29 rounding method: half to even at the limit's last place (from memory).
test('rounded to each limit by itself', () => {
  const limits = { lower: '0.750', upper: '10', rounding: 'rounded' } as const;
  expect(judge(limits, '0.7495').verdict).toBe('accept');
  expect(judge(limits, '0.7494').verdict).toBe('reject');
  expect(judge(limits, '10.5').verdict).toBe('accept');
  expect(judge(limits, '10.50001').verdict).toBe('reject');
  expect(judge(limits, '10.5').inside).toBe(false);
});

test('capability, missing uncertainty, void and acceptance limits', () => {
  const limits = { lower: '0.750', upper: '1.05' };
  const uncertainty = { expanded: '0.020', k: '2' };
  const guarded = { ...limits, decision: { rule: 'guarded', form: 'binary' } as const };
  expect(judge(guarded, '0.9', { uncertainty })).toMatchObject({ acceptLower: '0.77', acceptUpper: '1.03', lower: '0.750' });
  expect(judge(guarded, '0.9')).toMatchObject({ verdict: 'not-evaluable', acceptLower: null, conformanceProbability: null });
  expect(judge(guarded, '0.9', { uncertainty, void: { reason: 'x' } }).verdict).toBe('not-evaluable');
  const capable = (c: string) => judge({ ...limits, decision: { rule: 'simple', capability: c } }, '5', { uncertainty }).verdict;
  expect([capable('7.5'), capable('7.6')]).toEqual(['reject', 'indeterminate']);
});

test('temperature converts with its offset, an uncertainty without', () => {
  expect(decimalText(convertValue(rationalOf('212'), unit('°F'), unit('°C')), 6)).toBe('100');
  const row = judge({ unit: '°C', upper: '100', decision: { rule: 'guarded', form: 'binary' } }, '200', {
    unit: '°F',
    uncertainty: { expanded: '9', k: '2' },
  });
  expect(row.acceptUpper).toBe('95');
});

test('half to even, without trailing zeros, never minus zero', () => {
  expect(decimalText(roundHalfEven(ratio(5n, 2n), 0), 0)).toBe('2');
  expect(decimalText(ratio(-1n, 1000n), 2)).toBe('0');
  expect(decimalText(ratio(-25n, 1000n), 2)).toBe('-0.02');
});

test('tightening a limit never turns reject into accept', () => {
  const cents = fc.integer({ min: -500, max: 500 });
  const dec = (n: number) => decimalText(ratio(BigInt(n), 100n), 2);
  fc.assert(
    fc.property(cents, cents, fc.nat(200), fc.constantFrom('binary', 'non-binary'), (y, upper, by, form) => {
      const decision = { rule: 'guarded', form } as const;
      const verdictAt = (at: number) =>
        judge({ upper: dec(at), decision }, dec(y), { uncertainty: { expanded: '0.5', k: '2' } }).verdict;
      if (verdictAt(upper) === 'reject') expect(verdictAt(upper - by)).toBe('reject');
      expect(compare(rationalOf(dec(y)), ratio(BigInt(y), 100n))).toBe(0);
    }),
  );
});
