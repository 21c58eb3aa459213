import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  diameterMm,
  equivalentSensitivityPercent,
  equivalentWireMm,
  indicatorOf,
  isFineEnough,
  nearestAstmWire,
  plaqueHoleMm,
  plaqueThicknessMm,
  qualityLevelOf,
  requiredPlaque,
  sensitivityPercent,
} from '@/services/engine/methods/radiography/indicators';
import * as tables from '@/services/engine/methods/radiography/indicator-tables';
import { compare, numberOf } from '@/services/engine/quantity/decimal';
import { referenceJson, referenceRows, withoutReference } from '../../support/reference';
import { codeOf, exactly as x, figure, valueOf } from './numbers';

const indicator = (mark: string) => valueOf(indicatorOf(mark));
const HOLES = { '1T': 1, '2T': 2, '4T': 4 } as const;

describe.skipIf(withoutReference)('published indicators', () => {
  test('wires of ISO 19232-1 and their sets', () => {
    const rows = referenceRows('wire_iqi_iso19232-1.csv');
    expect(rows.length).toBe(tables.ISO_WIRES_MM.length);
    rows.forEach((row, place) => {
      expect(compare(diameterMm(indicator(row.wire ?? '')), x(row.diameter_mm ?? ''))).toBe(0);
      const sets = tables.ISO_WIRE_SETS.filter((first) => place + 1 >= first && place + 1 < first + 7);
      expect(row.sets).toBe(sets.map((first) => `W${String(first)}-W${String(first + 6)}`).join(' '));
    });
  });

  test('step holes of ISO 19232-2 and their sets', () => {
    const rows = referenceRows('step_hole_iqi_iso19232-2.csv');
    expect(rows.length).toBe(tables.ISO_HOLES_MM.length);
    rows.forEach((row, place) => {
      expect(compare(diameterMm(indicator(row.hole ?? '')), x(row.diameter_and_step_mm ?? ''))).toBe(0);
      const sets = tables.ISO_HOLE_SETS.filter((first) => place + 1 >= first && place + 1 < first + 6);
      expect(row.sets).toBe(sets.map((first) => `H${String(first)}`).join(' '));
    });
  });

  test('duplex wires of ISO 19232-5', () => {
    const rows = referenceRows('duplex_wire_iso19232-5.csv');
    expect(rows.map((row) => Number(row.wire_diameter_and_gap_mm))).toEqual(tables.DUPLEX_WIRES_MM.map(Number));
    expect(rows.map((row) => Number(row.total_unsharpness_mm) / 2)).toEqual(
      rows.map((row) => Number(row.basic_spatial_resolution_mm)),
    );
  });

  test('wires of ASTM E747 and their sets', () => {
    const rows = referenceRows('wire_iqi_astm_e747.csv');
    expect(rows.length).toBe(24);
    for (const row of rows) {
      const wire = diameterMm(indicator(`E747 ${row.identity ?? ''}`));
      expect(numberOf(wire) / 25.4).toBeCloseTo(Number(row.diameter_in), 12);
      expect(Math.abs(numberOf(wire) - Number(row.diameter_mm))).toBeLessThan(0.006);
      const first = tables.ASTM_WIRE_SETS[(row.set ?? 'A') as 'A'];
      expect(Number(row.identity) >= first && Number(row.identity) <= first + 5).toBe(true);
    }
  });

  test('plaques and holes of ASTM E1025, and the wires that equal them by E747', () => {
    const rows = referenceRows('hole_wire_equivalence.csv');
    expect(rows.length).toBe(3 * tables.ASTM_PLAQUES.length);
    for (const row of rows) {
      const hole = HOLES[row.hole as '1T'];
      const number = Number(row.plaque_no);
      expect(numberOf(plaqueThicknessMm(number)) / 25.4).toBeCloseTo(Number(row.plaque_T_in), 12);
      expect(numberOf(plaqueHoleMm(number, hole)) / 25.4).toBeCloseTo(Number(row.hole_dia_in), 12);
      const wire = figure(equivalentWireMm(plaqueThicknessMm(number), plaqueHoleMm(number, hole)));
      expect(wire / 25.4).toBeCloseTo(Number(row.equivalent_wire_in), 6);
      expect(wire).toBeCloseTo(Number(row.equivalent_wire_mm), 4);
    }
  });

  test('equivalent sensitivity of the quality levels', () => {
    const rows = referenceRows('hole_iqi_eps.csv');
    expect(rows.length).toBe(9);
    for (const row of rows) {
      const level = valueOf(qualityLevelOf(row.quality_level ?? ''));
      expect([level.percent, level.hole]).toEqual([Number(row.plaque_T_percent), Number(row.hole_multiple_of_T)]);
      // A part of 100 mm with a plaque of exactly that share and a hole of that multiple of it.
      expect(figure(equivalentSensitivityPercent(x(100), x(level.percent), x(level.percent * level.hole)))).toBeCloseTo(
        Number(row.EPS_percent_exact),
        4,
      );
    }
  });

  test('sensitivity of a wire', () => {
    const { wire_contrast_sensitivity_percent: rows } = referenceJson<{
      wire_contrast_sensitivity_percent: { wire_mm: number; thickness_mm: number; percent: number }[];
    }>('radiography_examples.json');
    for (const row of rows) {
      const number = tables.ISO_WIRES_MM.findIndex((wire) => Number(wire) === row.wire_mm) + 1;
      expect(figure(sensitivityPercent({ kind: 'iso-wire', number }, x(row.thickness_mm)))).toBeCloseTo(row.percent, 12);
    }
    expect(rows.length).toBe(3);
  });
});

describe('indicators', () => {
  // ASME V T-283 names #12-2T, #17-1T and #7-4T as equals (from a training page); they agree within 2 %.
  test('equals of the trade have the same sensitivity to 2 %', () => {
    const [first, ...others] = ['12-2T', '17-1T', '#7-4T'].map((mark) => figure(sensitivityPercent(indicator(mark), x(15))));
    for (const other of others) expect(Math.abs(other / (first ?? 1) - 1)).toBeLessThan(0.02);
  });

  // E747: the #10 plaque's 2T hole equals a wire of 0.00597 in; the identity listed for it is 4 (0.0063 in).
  test('the nearest wire', () => {
    expect(valueOf(nearestAstmWire(valueOf(equivalentWireMm(plaqueThicknessMm(10), plaqueHoleMm(10, 2)))))).toBe(4);
    expect(valueOf(nearestAstmWire(x('0.001')))).toBe(1);
    expect(valueOf(nearestAstmWire(x(100)))).toBe(21);
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 21 }),
        (number) => valueOf(nearestAstmWire(diameterMm({ kind: 'astm-wire', number }))) === number,
      ),
    );
  });

  // By hand (E1025): 2 % of 0.5 in is 0.010 in, the #10 plaque; just under, the #7.
  test('the plaque that a level requires', () => {
    const level = valueOf(qualityLevelOf('2-2t'));
    expect(valueOf(requiredPlaque(level, x('12.7')))).toEqual({ kind: 'astm-plaque', number: 10, hole: 2 });
    expect(valueOf(requiredPlaque(level, x('12.699999')))).toEqual({ kind: 'astm-plaque', number: 7, hole: 2 });
    expect(codeOf(requiredPlaque(level, x(6)))).toBe('part-too-thin-for-plaques');
    expect(codeOf(requiredPlaque(level, x(0)))).toBe('not-above-zero');
  });

  test.each([
    ['W13', 'W13', true],
    ['W13', 'W14', true],
    ['W13', 'W12', false],
    ['H5', 'H5', true],
    ['H5', 'H6', false],
    ['E747 8', 'E747 7', true],
    ['E747 8', 'E747 9', false],
    ['12-2T', '17-1T', false],
    ['12-2T', '7-4T', true],
    ['12-2T', '12-1T', true],
    ['10-2T', 'W14', false],
    ['10-2T', 'W15', true],
    ['W10', 'E747 8', false],
    ['W10', 'E747 7', true],
  ])('required %s, seen %s: %s', (required, seen, fine) => {
    expect(valueOf(isFineEnough(indicator(required), indicator(seen)))).toBe(fine);
  });

  test('a finer wire, hole or plaque is never worse', () => {
    const wires = fc.integer({ min: 1, max: 19 });
    fc.assert(
      fc.property(wires, wires, wires, (a, b, c) => {
        const wire = (number: number) => ({ kind: 'iso-wire', number }) as const;
        const fine = (required: number, seen: number) => valueOf(isFineEnough(wire(required), wire(seen)));
        expect(fine(a, b)).toBe(b >= a);
        if (fine(a, b) && fine(b, c)) expect(fine(a, c)).toBe(true);
        expect(compare(valueOf(sensitivityPercent(wire(a), x(10))), valueOf(sensitivityPercent(wire(b), x(10)))) <= 0).toBe(
          a >= b,
        );
      }),
    );
  });

  test('refusals', () => {
    for (const mark of ['W0', 'W20', 'H19', 'E747 22', '11-2T', '12-3T', '', 'D7', '2T'])
      expect(codeOf(indicatorOf(mark))).toBe('indicator-unknown');
    expect(codeOf(isFineEnough(indicator('H5'), indicator('W10')))).toBe('indicators-not-comparable');
    expect(codeOf(qualityLevelOf('3-2T'))).toBe('level-unknown');
    expect(codeOf(sensitivityPercent(indicator('W10'), x(0)))).toBe('not-above-zero');
    expect(codeOf(equivalentSensitivityPercent(x(1), x(0), x(1)))).toBe('not-above-zero');
    expect(codeOf(equivalentWireMm(x(1), x(0)))).toBe('not-above-zero');
    expect(codeOf(nearestAstmWire(x(0)))).toBe('not-above-zero');
  });
});
