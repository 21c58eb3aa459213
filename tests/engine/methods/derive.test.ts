import { describe, expect, test } from 'vitest';
import { derivePlanned } from '@/services/engine/methods/derive-planned';
import { derive, derivedQuantity, DERIVED_QUANTITIES } from '@/services/engine/methods/derive';
import type { EnteredInput } from '@/services/engine/methods/read-inputs';
import { unitOf } from '@/services/engine/quantity/units';
import { derivedEntrySentences } from '@/services/engine/sentences/derived-entries';
import { derivedRefusalSentences } from '@/services/engine/sentences/derived-refusals';
import { gaugeProfile } from './duplex-profile';

/** Inputs from `{name: 'value unit'}`; a list is `'1 2 3 unit'` under a name that ends in `[]`, no unit is a trailing `-`. */
function inputs(given: Readonly<Record<string, string>>): EnteredInput[] {
  return Object.entries(given).map(([name, text]) => {
    const parts = text.split(' ');
    const unit = parts.pop();
    const value = name.endsWith('[]') ? parts : parts.join(' ');
    return { name: name.replace('[]', ''), value, ...(unit === '-' ? {} : { unit }) };
  });
}
const answer = (quantity: string, given: Readonly<Record<string, string>>) => {
  const found = derive(quantity, inputs(given));
  return found.ok ? `${found.value} ${found.unit}` : found.faults.map(({ path, code }) => `${path}: ${code}`).join('; ');
};

// Each expectation is worked by hand or is a published example named in the method's own test.
const cases: [string, Record<string, string>, string][] = [
  ['thickness-by-velocity', { velocity: '5820 m/s', transit: '1.000 µs' }, '2.91 mm'],
  ['thickness-by-velocity', { velocity: '0.2 in/µs', transit: '1 µs', zero: '500 ns' }, '1.27 mm'],
  [
    'thickness-by-two-blocks',
    {
      'thin-block': '1 mm',
      'thin-block-transit': '0.4137 µs',
      'thick-block': '5 mm',
      'thick-block-transit': '1.7883 µs',
      transit: '1 µs',
    },
    '2.706096 mm',
  ],
  [
    'velocity-by-two-blocks',
    { 'thin-block': '2 mm', 'thin-block-transit': '0.8872 µs', 'thick-block': '10 mm', 'thick-block-transit': '3.6361 µs' },
    '5.82051 mm/µs',
  ],
  ['core-shift-of-opposed-walls', { 'first-wall': '0.82 mm', 'second-wall': '0.74 mm' }, '0.04 mm'],
  [
    'core-shift-of-four-walls',
    { 'wall-0': '1.10 mm', 'wall-90': '1.04 mm', 'wall-180': '0.90 mm', 'wall-270': '0.96 mm' },
    '0.107703 mm',
  ],
  [
    'least-wall-of-four-walls',
    { 'wall-0': '1.10 mm', 'wall-90': '1.04 mm', 'wall-180': '0.90 mm', 'wall-270': '0.96 mm' },
    '0.892297 mm',
  ],
  [
    'core-shift-over-sections',
    { 'x-first[]': '1.1 1.14 mm', 'x-second[]': '0.9 0.86 mm', 'y-first[]': '1.05 mm', 'y-second[]': '0.95 mm' },
    '0.13 mm',
  ],
  [
    'core-rotation-over-sections',
    {
      'x-first[]': '1.02 0.98 mm',
      'x-second[]': '0.98 1.02 mm',
      'y-first[]': '1.02 0.98 mm',
      'y-second[]': '0.98 1.02 mm',
      'x-pairs-at-y[]': '-10 10 mm',
      'y-pairs-at-x[]': '10 -10 mm',
    },
    '0.114592 °',
  ],
  ['geometric-unsharpness', { 'focal-spot': '3 mm', 'source-to-object': '700 mm', 'object-to-detector': '25 mm' }, '0.107143 mm'],
  ['magnification', { 'source-to-object': '20 cm', 'object-to-detector': '80 cm' }, '5 1'],
  [
    'total-unsharpness',
    { 'focal-spot': '3 mm', 'source-to-object': '600 mm', 'object-to-detector': '60 mm', 'inherent-unsharpness': '0.4 mm' },
    '0.5 mm',
  ],
  [
    'image-unsharpness',
    {
      'focal-spot': '0.4 mm',
      'source-to-object': '500 mm',
      'object-to-detector': '100 mm',
      'basic-spatial-resolution': '100 µm',
    },
    '0.179505 mm',
  ],
  ['least-source-distance', { 'focal-spot': '1 mm', 'object-to-detector': '10 mm', 'unsharpness-limit': '0.02 mm' }, '500 mm'],
  ['least-source-distance-by-class', { 'focal-spot': '0.4 mm', 'object-to-detector': '8 mm', 'testing-class': 'B -' }, '24 mm'],
  ['indicator-sensitivity', { 'indicator-seen': '10-2T -', 'part-thickness': '0.5 in' }, '2 %'],
  ['half-value-layers', { thickness: '38.1 mm', 'half-value-layer': '12.7 mm' }, '3 1'],
  ['signal-to-noise', { 'mean-grey': '12000 1', 'deviation-grey': '80 1' }, '150 1'],
  [
    'normalised-signal-to-noise',
    { 'mean-grey': '13000 1', 'deviation-grey': '100 1', 'basic-spatial-resolution': '100 µm' },
    '115.18 1',
  ],
  ['contrast-to-noise', { 'mean-grey': '11500 1', 'ground-mean-grey': '12000 1', 'deviation-grey': '200 1' }, '2.5 1'],
  ['penetrant-dwell-at-temperature', { 'specified-dwell': '20 min', 'part-temperature': '10 °C' }, '40 min'],
  ['true-position', { 'deviation-x': '0.03 mm', 'deviation-y': '0.04 mm' }, '0.1 mm'],
  [
    'position-less-bonus',
    {
      'deviation-x': '0.1 mm',
      'deviation-y': '0.075 mm',
      feature: 'hole -',
      'material-requirement': 'maximum -',
      'smallest-size': '10 mm',
      'largest-size': '10.1 mm',
      'actual-size': '10.08 mm',
    },
    '0.17 mm',
  ],
  ['profile-of-deviations', { 'deviations[]': '0.05 -0.03 0.11 -0.08 0.02 mm' }, '0.22 mm'],
  [
    'profile-after-fit-2d',
    {
      'nominal-x[]': '10 -10 0 0 mm',
      'nominal-y[]': '0 0 10 -10 mm',
      'normal-x[]': '1 -1 0 0 1',
      'normal-y[]': '0 0 1 -1 1',
      'measured-x[]': '15.03 -5 5 5 mm',
      'measured-y[]': '-2 -2 8 -12 mm',
    },
    '0.045 mm',
  ],
  ['circle-diameter', { 'points-x[]': '10 0 -10 mm', 'points-y[]': '0 10 0 mm' }, '20 mm'],
  ['chord', { 'leading-x': '0 mm', 'leading-y': '0 mm', 'trailing-x': '38 mm', 'trailing-y': '12.5 mm' }, '40.003125 mm'],
  ['stagger', { 'leading-x': '0 mm', 'leading-y': '0 mm', 'trailing-x': '38 mm', 'trailing-y': '12.5 mm' }, '18.208484 °'],
  ['average-length', { 'lengths[]': '1.02 0.99 1.05 mm' }, '1.02 mm'],
  ['range-of-lengths', { 'lengths[]': '1.02 0.99 1.05 mm' }, '0.06 mm'],
  ['largest-length', { 'lengths[]': '1.02 0.99 1.05 mm' }, '1.05 mm'],
  ['least-length', { 'lengths[]': '1.02 0.99 1.05 mm' }, '0.99 mm'],
  [
    'flow-parameter',
    { flow: '11.802298 g/s', 'total-temperature': '20 °C', 'total-pressure': '500 kPa' },
    '404.149012 mg·√K/(s·kPa)',
  ],
  ['corrected-flow', { flow: '1.2 kg/s', 'total-temperature': '310 K', 'total-pressure': '98.5 kPa' }, '1280.36314 g/s'],
  [
    'effective-area',
    { flow: '2.1 g/s', 'total-temperature': '300 K', 'total-pressure': '2 bar', 'outlet-pressure': '101325 Pa' },
    '4.499958 mm²',
  ],
  ['flow-ratio-to-master', { 'part-flow-parameter': '98 mg·√K/(s·kPa)', 'master-flow-parameter': '100 mg·√K/(s·kPa)' }, '0.98 1'],
  ['grain-number-by-intercept', { 'whole-intercepts': '100 -', 'line-length': '32 mm', magnification: '1 1' }, '0 1'],
  ['grain-number-by-count', { 'grains-inside': '155 -', 'figure-area': '1000 mm²', magnification: '100 1' }, '7.644 1'],
  ['largest-grain-area', { 'grain-lengths[]': '1 2 mm', 'grain-widths[]': '1 1 mm' }, '1.570796 mm²'],
  ['columnar-deviation', { along: '10 mm', across: '-1 mm' }, '5.710593 °'],
  ['orientation-angle', { phi1: '123 °', 'capital-phi': '33 °', phi2: '17 °' }, '33 °'],
  ['secondary-orientation-angle', { phi1: '80 °', 'capital-phi': '0 °', phi2: '0 °' }, '10 °'],
  [
    'disorientation',
    {
      'first-phi1': '60 °',
      'first-capital-phi': '45 °',
      'first-phi2': '60 °',
      'second-phi1': '60 °',
      'second-capital-phi': '45 °',
      'second-phi2': '0 °',
    },
    '30 °',
  ],
  [
    'density-by-immersion',
    { 'weight-in-air': '182.40 g', 'weight-in-liquid': '160.20 g', 'liquid-density': '998.207 kg/m³' },
    '8.192825 g/cm³',
  ],
  [
    'volume-by-immersion',
    { 'weight-in-air': '80 g', 'weight-in-liquid': '70 g', 'liquid-density': '1 g/cm³', 'air-density': '0 g/cm³' },
    '10 cm³',
  ],
  ['mass-without-buoyancy', { 'weight-in-air': '1 kg', 'part-density': '2.7 g/cm³' }, '1000.294575 g'],
];
test.each(cases)('%s %j is %s', (quantity, given, expected) => {
  expect(answer(quantity, given)).toBe(expected);
});

test('every quantity has a case above (three of them below), its own name, and units of the table', () => {
  const shown = new Set([
    ...cases.map(([name]) => name),
    'profile-after-fit-3d',
    'basic-spatial-resolution',
    'region-signal-to-noise',
  ]);
  expect(DERIVED_QUANTITIES.filter(({ name }) => !shown.has(name))).toEqual([]);
  expect(new Set(DERIVED_QUANTITIES.map(({ name }) => name)).size).toBe(DERIVED_QUANTITIES.length);
  for (const { unit, inputs: forms, places } of DERIVED_QUANTITIES) {
    expect(unitOf(unit)).toBeDefined();
    expect(places).toBeGreaterThan(0);
    expect(new Set(forms.map(({ name }) => name)).size).toBe(forms.length);
    for (const form of forms) if (form.kind === 'value' || form.kind === 'values') expect(unitOf(form.unit)).toBeDefined();
  }
});

test('profile after fit in three dimensions, and the resolution of a duplex gauge, from lists', () => {
  const fit = answer('profile-after-fit-3d', {
    'nominal-x[]': '0 10 0 10 mm',
    'nominal-y[]': '0 0 10 10 mm',
    'nominal-z[]': '0 0 0 0 mm',
    'normal-x[]': '0 0 0 0 1',
    'normal-y[]': '0 0 0 0 1',
    'normal-z[]': '1 1 1 1 1',
    'measured-x[]': '0 10 0 10 mm',
    'measured-y[]': '0 0 10 10 mm',
    'measured-z[]': '0.01 -0.01 -0.01 0.01 mm',
  });
  expect(fit).toBe('0.02 mm');
  const profile = gaugeProfile({ blurSigmaMm: 0.1, stepMm: 0.02, signalToNoise: 1e6 });
  const read = derive('basic-spatial-resolution', [
    { name: 'profile', value: profile.values.map((value) => value.toFixed(3)), unit: '1' },
    { name: 'profile-step', value: '20', unit: 'µm' },
    { name: 'wires', value: 'darker' },
  ]);
  expect(read.ok && Math.abs(Number(read.value) / (0.1 * Math.SQRT2) - 1)).toBeLessThan(0.01);
});

// Even columns 99, odd 101 in every row of 20 × 55: deviations of 1 about 100, less what the plane takes of them, √(n/(n − 3)).
test('signal-to-noise of a region', () => {
  const grey = Array.from({ length: 1100 }, (_, place) => (place % 2 === 0 ? '99' : '101'));
  const found = derive('region-signal-to-noise', [
    { name: 'region-grey', value: grey, unit: '1' },
    { name: 'region-width', value: '20' },
  ]);
  expect(found.ok && Math.abs(Number(found.value) - 100)).toBeLessThan(0.5);
  expect(found.ok && found.steps[0]?.value).toBe('100');
  expect(answer('region-signal-to-noise', { 'region-grey[]': '1 2 3 4 1', 'region-width': '2 -' })).toBe(
    'inputs: region-too-small',
  );
});

test('steps show what the result came from', () => {
  const found = derive(
    'thickness-by-two-blocks',
    inputs({
      'thin-block': '1 mm',
      'thin-block-transit': '0.4137 µs',
      'thick-block': '5 mm',
      'thick-block-transit': '1.7883 µs',
      transit: '1 µs',
    }),
  );
  expect(found.ok && found.steps).toEqual([
    { name: 'velocity', value: '5.819875', unit: 'mm/µs' },
    { name: 'zero', value: '0.07005', unit: 'µs' },
  ]);
});

describe('a result is rounded half to even', () => {
  test.each([
    ['0.0000025', '0.000002 mm'],
    ['0.0000035', '0.000004 mm'],
    ['0.00000250000001', '0.000003 mm'],
  ])('a mean of one value %s mm', (value, expected) => {
    expect(answer('average-length', { 'lengths[]': `${value} mm` })).toBe(expected);
  });
});

describe('faults, all at once and each at its place', () => {
  test.each<[string, Record<string, string>, string]>([
    ['thickness', {}, 'quantity: quantity-unknown'],
    ['thickness-by-velocity', {}, 'inputs: input-missing; inputs: input-missing'],
    [
      'thickness-by-velocity',
      { velocity: '0 m/s', transit: '1,0 µs', zero: '0 mm', echo: '1 µs' },
      'inputs.0.value: not-above-zero; inputs.1.value: not-a-decimal; inputs.2.unit: unit-of-other-quantity; inputs.3.name: input-unknown',
    ],
    ['thickness-by-velocity', { velocity: '5820 m/s', transit: '0 µs' }, 'inputs: echo-before-zero'],
    ['average-length', { 'lengths[]': 'mm' }, 'inputs.0.value: too-few-values'],
    ['average-length', { lengths: '1 mm' }, 'inputs.0.value: list-wanted'],
    ['average-length', { 'lengths[]': '1 x 3 mm' }, 'inputs.0.value.1: not-a-decimal'],
    ['true-position', { 'deviation-x[]': '1 mm', 'deviation-y': '1 mm' }, 'inputs.0.value: one-value-wanted'],
    [
      'grain-number-by-count',
      { 'grains-inside': '1.5 -', 'figure-area': '1 mm²', magnification: '1 1' },
      'inputs.0.value: not-a-count',
    ],
    [
      'grain-number-by-count',
      { 'grains-inside': '1 mm', 'figure-area': '1 mm²', magnification: '1 1' },
      'inputs.0.unit: unit-not-wanted',
    ],
    [
      'least-source-distance-by-class',
      { 'focal-spot': '1 mm', 'object-to-detector': '1 mm', 'testing-class': 'C -' },
      'inputs.2.value: not-a-choice',
    ],
    ['indicator-sensitivity', { 'indicator-seen': ' -', 'part-thickness': '1 mm' }, 'inputs.0.value: mark-missing'],
    ['indicator-sensitivity', { 'indicator-seen': 'W99 -', 'part-thickness': '1 mm' }, 'inputs: indicator-unknown'],
    ['circle-diameter', { 'points-x[]': '1 2 3 mm', 'points-y[]': '1 2 3 4 mm' }, 'inputs: lists-of-different-length'],
    [
      'core-shift-over-sections',
      { 'x-first[]': '1 1 mm', 'x-second[]': '1 mm', 'y-first[]': '1 mm', 'y-second[]': '1 mm' },
      'inputs: lists-of-different-length',
    ],
    ['half-value-layers', { thickness: '9999999999999999 m', 'half-value-layer': '0.000001 µm' }, 'inputs: result-too-large'],
  ])('%s %j: %s', (quantity, given, expected) => {
    expect(answer(quantity, given)).toBe(expected);
  });

  test('twice the same input; a wall outside its blocks; too many values', () => {
    const velocity = { name: 'velocity', value: '5820', unit: 'm/s' };
    const twice = derive('thickness-by-velocity', [velocity, velocity, { name: 'transit', value: '1', unit: 'µs' }]);
    expect(twice.ok || twice.faults.map(({ path, code }) => [path, code])).toEqual([['inputs.1.name', 'input-twice']]);
    const blocks = {
      'thin-block': '1 mm',
      'thin-block-transit': '0.4 µs',
      'thick-block': '5 mm',
      'thick-block-transit': '1.8 µs',
    };
    expect(answer('thickness-by-two-blocks', { ...blocks, transit: '1.8 µs' })).toBe('5 mm');
    expect(answer('thickness-by-two-blocks', { ...blocks, transit: '1.81 µs' })).toBe('inputs: outside-blocks');
    const many = derive('average-length', [{ name: 'lengths', value: Array.from({ length: 1001 }, () => '1'), unit: 'mm' }]);
    expect(many.ok || many.faults[0]?.code).toBe('too-many-values');
  });
});

describe('a characteristic that its plan derives', () => {
  const planned = {
    characteristic: '7',
    quantity: 'thickness-by-velocity',
    inputs: [
      { name: 'velocity', value: '5820', unit: 'm/s' },
      { name: 'transit', unit: 'µs' },
    ],
  };
  const read = (given: Readonly<Record<string, string>>) => {
    const found = derivePlanned(planned, inputs(given));
    return found.ok ? `${found.value} ${found.unit}` : found.faults.map(({ path, code }) => `${path}: ${code}`).join('; ');
  };

  test('takes what the plan fixes and what was entered, in any unit', () => {
    expect(read({ transit: '1 µs' })).toBe('2.91 mm');
    expect(read({ transit: '1000 ns' })).toBe('2.91 mm');
  });

  test('refuses what is fixed, not asked for, missing or wrong', () => {
    expect(read({ transit: '1 µs', velocity: '6000 m/s' })).toBe('inputs.1.name: input-fixed');
    expect(read({ transit: '1 µs', zero: '0.1 µs' })).toBe('inputs.1.name: input-unknown');
    expect(read({})).toBe('inputs: input-missing');
    expect(read({ transit: '1 mm' })).toBe('inputs.0.unit: unit-of-other-quantity');
    const unknown = derivePlanned({ ...planned, quantity: 'wall' }, []);
    expect(unknown.ok || unknown.faults[0]?.code).toBe('quantity-unknown');
  });
});

test('an unknown name of an inherited property is no quantity', () => {
  expect(derivedQuantity('toString')).toBeUndefined();
  expect(derivedQuantity('chord')?.unit).toBe('mm');
});

test('the sentences of both languages name the same parameters', () => {
  for (const pair of Object.values({ ...derivedEntrySentences, ...derivedRefusalSentences })) {
    const names = (text: string) => [...text.matchAll(/\{(\w+)\}/g)].map((match) => match[1]).sort();
    expect(names(pair.fr)).toEqual(names(pair.en));
  }
});
