import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { E1417_CHECKS } from '@/services/engine/methods/penetrant/check-intervals';
import { dwellAtTemperatureMin } from '@/services/engine/methods/penetrant/dwell';
import { suggestedWindows, WINDOW_SOURCES } from '@/services/engine/methods/penetrant/suggested-windows';
import { penetrantStandings, PENETRANT_STEPS, penetrantWindowFaults } from '@/services/engine/methods/penetrant/windows';
import type { PenetrantWindow } from '@/services/engine/methods/penetrant/windows';
import { decimalText, rationalOf } from '@/services/engine/quantity/decimal';
import { convertValue, unitOf } from '@/services/engine/quantity/units';
import { referenceRows, withoutReference } from '../../support/reference';
import { codeOf, exactly as x, valueOf } from './numbers';

const UNITS: Readonly<Record<string, string>> = {
  degC: '°C',
  min: 'min',
  kPa: 'kPa',
  mm: 'mm',
  'uW/cm2': 'µW/cm²',
  'W/m2': 'W/m²',
  lx: 'lx',
};

describe.skipIf(withoutReference)('published penetrant figures', () => {
  // Most rows of both files are from memory of E1417; the check is one of transcription, not of the standard.
  test.each([
    ['ASTM E1417', 'part-temperature', 'part/penetrant/ambient temperature', 'ASTM E1417/E1417M (40-125 F)'],
    ['ASTM E1417', 'emulsifier-dwell', 'lipophilic emulsifier dwell, Type I', 'ASTM E1417/E1417M'],
    ['ASTM E1417', 'remover-dwell', 'hydrophilic remover dwell (immersion)', 'ASTM E1417/E1417M'],
    ['ASTM E1417', 'rinse-temperature', 'wash water temperature', 'ASTM E1417/E1417M (50-100 F)'],
    ['ASTM E1417', 'rinse-pressure', 'wash water pressure (spray)', 'ASTM E1417/E1417M (40 psi)'],
    ['ASTM E1417', 'rinse-air-pressure', 'hydro-air nozzle air pressure', 'ASTM E1417/E1417M (25 psi)'],
    ['ASTM E1417', 'rinse-distance', 'spray nozzle distance', 'ASTM E1417/E1417M (12 in)'],
    ['ASTM E1417', 'drying-temperature', 'drying oven temperature', 'ASTM E1417/E1417M (160 F)'],
    ['ASTM E1417', 'developer-dwell', 'developer dwell, dry powder (form a)', 'ASTM E1417/E1417M'],
    ['ASTM E1417', 'uv-a', 'UV-A irradiance at part surface', 'ASTM E1417/E1417M'],
    ['ASTM E1417', 'ambient-light', 'ambient white light, booth', 'ASTM E1417/E1417M (2 fc)'],
    ['ASTM E1417', 'white-light', 'white light, visible dye (Type II)', 'ASTM E1417/E1417M (100 fc)'],
    ['ASTM E1417', 'dark-adaptation', 'dark adaptation', 'ASTM E1417/E1417M / ISO 3059'],
    ['ISO 3059', 'uv-a', 'UV-A irradiance, ISO 3059 examination', 'ISO 3059 (10 W/m2 = 1000 uW/cm2), measured at about 40 cm'],
    ['ISO 3059', 'ambient-light', 'ambient light, ISO 3059 examination', 'ISO 3059'],
  ])('%s: %s', (source, step, parameter, from) => {
    const row = referenceRows('e1417_limits.csv').find((one) => one.parameter === parameter && one.source === from);
    const window = suggestedWindows(source).find((one) => one.step === step);
    expect([window?.lower ?? '', window?.upper ?? '', window?.unit]).toEqual([row?.min, row?.max, UNITS[row?.unit ?? '']]);
  });

  test('check intervals of E1417', () => {
    const rows = referenceRows('e1417_check_intervals.csv').filter((row) => row.source?.startsWith('ASTM E1417'));
    expect(E1417_CHECKS.map(({ check }) => check)).toEqual(rows.map((row) => row.check));
    E1417_CHECKS.forEach(({ interval }, place) =>
      expect(rows[place]?.interval?.replace(' ', '-').startsWith(interval)).toBe(true),
    );
  });
});

const technique: readonly PenetrantWindow[] = [
  { step: 'penetrant-dwell', lower: '20', upper: '60', unit: 'min' },
  { step: 'rinse-pressure', lower: null, upper: '40', unit: 'psi' },
  { step: 'rinse-temperature', lower: '50', upper: '100', unit: '°F' },
  { step: 'drying-temperature', lower: null, upper: '71', unit: '°C' },
  { step: 'developer-dwell', lower: '10', upper: '240', unit: 'min' },
  { step: 'uv-a', lower: '1000', upper: null, unit: 'µW/cm²' },
  { step: 'ambient-light', lower: null, upper: '2', unit: 'fc' },
];

describe('windows of a technique', () => {
  const entry = (step: string, value: string, unit: string) => ({ step, value, unit });
  const standing = (...entries: ReturnType<typeof entry>[]) =>
    Object.fromEntries(penetrantStandings(technique, entries).map((row) => [row.step, row.standing]));

  test('limits are inside, in any unit; what was not entered says so', () => {
    const found = standing(
      entry('penetrant-dwell', '20', 'min'),
      entry('rinse-pressure', '275.8', 'kPa'),
      entry('rinse-temperature', '10', '°C'),
      entry('drying-temperature', '344.15', 'K'),
      entry('uv-a', '10', 'W/m²'),
      entry('ambient-light', '21.6', 'lx'),
    );
    // 40 psi = 275.79 kPa; 50 °F = 10 °C exactly; 71 °C = 344.15 K exactly; 2 fc = 21.53 lx.
    expect(found).toEqual({
      'penetrant-dwell': 'inside',
      'rinse-pressure': 'above',
      'rinse-temperature': 'inside',
      'drying-temperature': 'inside',
      'developer-dwell': 'not-entered',
      'uv-a': 'inside',
      'ambient-light': 'above',
    });
  });

  test('the worst of several entries stands; what cannot be read is not guessed', () => {
    expect(standing(entry('uv-a', '1200', 'µW/cm²'), entry('uv-a', '990', 'µW/cm²'))['uv-a']).toBe('below');
    expect(standing(entry('uv-a', '1e3', 'µW/cm²'))['uv-a']).toBe('unreadable');
    expect(standing(entry('uv-a', '1200', 'lx'))['uv-a']).toBe('unreadable');
  });

  test('the unit of entry never changes a standing', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 200 }), (celsius) => {
        const [c, f] = [unitOf('°C'), unitOf('°F')];
        if (!c || !f) throw new Error('units');
        const fahrenheit = decimalText(convertValue(rationalOf(String(celsius)), c, f), 16);
        expect(standing(entry('drying-temperature', fahrenheit, '°F'))).toEqual(
          standing(entry('drying-temperature', String(celsius), '°C')),
        );
      }),
      { numRuns: 500 },
    );
  });

  test('a sound table has no fault; each fault is named where it is, all at once', () => {
    expect(penetrantWindowFaults(technique, 'I', 'A')).toEqual([]);
    const faults = penetrantWindowFaults(
      [
        { step: 'penetrant-dwell', lower: '60', upper: '20', unit: 'min' },
        { step: 'penetrant-dwell', lower: '20', upper: null, unit: '°C' },
        { step: 'soaking', lower: '1', upper: null, unit: 'min' },
        { step: 'uv-a', lower: null, upper: null, unit: 'lx' },
        { step: 'rinse-pressure', lower: '1,5', upper: 'x', unit: 'psi' },
      ],
      'I',
      'A',
    );
    expect(faults.map(({ path }) => path)).toEqual([
      'windows.0.lower',
      'windows.1.step',
      'windows.1.unit',
      'windows.2.step',
      'windows.3.unit',
      'windows.3',
      'windows.4.lower',
      'windows.4.upper',
      ...Array.from({ length: 4 }, () => 'windows'),
    ]);
    expect(penetrantWindowFaults(technique, 'II', 'A').map(({ message }) => message)).toEqual(['white-light has no window']);
  });

  test('post-emulsifiable work needs its dwell, solvent removable no rinse', () => {
    const missing = (method: 'A' | 'B' | 'C' | 'D') =>
      penetrantWindowFaults(technique, 'I', method).map(({ message }) => message);
    expect(missing('B')).toEqual(['emulsifier-dwell has no window']);
    expect(missing('D')).toEqual(['remover-dwell has no window']);
    const wiped = technique.filter(({ step }) => !step.startsWith('rinse') && !step.startsWith('drying'));
    expect(penetrantWindowFaults(wiped, 'I', 'C')).toEqual([]);
    expect(penetrantWindowFaults(wiped, 'I', 'A').length).toBe(3);
  });

  test('every suggested window is one that a technique could take', () => {
    for (const source of WINDOW_SOURCES) {
      const faults = penetrantWindowFaults(suggestedWindows(source), 'I', 'D').filter(({ path }) => path !== 'windows');
      expect(faults).toEqual([]);
      for (const { step } of suggestedWindows(source)) expect(PENETRANT_STEPS).toContain(step);
    }
    expect(suggestedWindows('toString')).toEqual([]);
  });
});

// T.O. 33B-1-1 2.4.5.5.2.5.4: 60–100 °F as specified, 40–60 doubled, 100–120 halved but at least 5 min.
test.each([
  ['20', '70', '20'],
  ['20', '60', '20'],
  ['20', '59.9', '40'],
  ['20', '100', '20'],
  ['20', '100.1', '10'],
  ['8', '120', '5'],
])('dwell of %s min at %s °F is %s min', (specified, fahrenheit, expected) => {
  expect(decimalText(valueOf(dwellAtTemperatureMin(x(specified), x(fahrenheit))), 6)).toBe(expected);
});

test('no dwell outside the rule', () => {
  expect(codeOf(dwellAtTemperatureMin(x(20), x('39.9')))).toBe('outside-dwell-rule');
  expect(codeOf(dwellAtTemperatureMin(x(20), x('120.1')))).toBe('outside-dwell-rule');
  expect(codeOf(dwellAtTemperatureMin(x(0), x(70)))).toBe('not-above-zero');
});
