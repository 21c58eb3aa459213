import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { dipPercent, duplexResolution } from '@/services/engine/methods/radiography/duplex-resolution';
import type { DuplexResolution } from '@/services/engine/methods/radiography/duplex-resolution';
import {
  contrastToNoise,
  medianRowSignalToNoise,
  normalisedSignalToNoise,
  regionSignal,
  signalToNoise,
} from '@/services/engine/methods/radiography/signal';
import { leastNormalisedSignalToNoise } from '@/services/engine/methods/radiography/signal-minimum';
import { extremeAbout } from '@/services/engine/methods/radiography/smooth-extremes';
import { decimalText } from '@/services/engine/quantity/decimal';
import { referenceJson, referenceRows, withoutReference } from '../../support/reference';
import { gaugeProfile, noiseFrom } from './duplex-profile';
import { codeOf, exactly as x, figure, valueOf } from './numbers';

describe.skipIf(withoutReference)('published signal figures', () => {
  test('normalised signal-to-noise ratio', () => {
    const { SNRN } = referenceJson<{ SNRN: { SNR: number; SRb_um: number; SNRN: number }[] }>('radiography_examples.json');
    expect(SNRN.length).toBe(5);
    for (const one of SNRN) expect(figure(normalisedSignalToNoise(x(one.SNR), x(one.SRb_um / 1000)))).toBeCloseTo(one.SNRN, 4);
  });

  // From memory of ISO 17636-2:2013 table 3, in the file and here alike: a transcription check, not a proof of the standard.
  test('least normalised signal-to-noise ratios', () => {
    const rows = referenceRows('snrn_minimum_iso17636-2.csv');
    expect(rows.length).toBe(13);
    for (const row of rows) {
      const [, side = '', limit = '10'] = /^(<=|>)([0-9]+)$/.exec(row.penetrated_mm ?? '') ?? [];
      const mm = side === '>' ? x(`${limit}.001`) : x(limit);
      expect(valueOf(leastNormalisedSignalToNoise(row.source ?? '', mm, 'A'))).toBe(Number(row.classA));
      expect(valueOf(leastNormalisedSignalToNoise(row.source ?? '', mm, 'B'))).toBe(Number(row.classB));
    }
  });
});

test('ratios by hand', () => {
  expect(decimalText(valueOf(signalToNoise(x(12_000), x(80))), 6)).toBe('150');
  expect(decimalText(valueOf(contrastToNoise(x(11_500), x(12_000), x(200))), 6)).toBe('2.5');
  expect(codeOf(signalToNoise(x(1), x(0)))).toBe('not-above-zero');
  expect(codeOf(contrastToNoise(x(1), x(2), x(0)))).toBe('not-above-zero');
  expect(codeOf(normalisedSignalToNoise(x(100), x(0)))).toBe('not-above-zero');
  expect(codeOf(leastNormalisedSignalToNoise('180 kV', x(10), 'A'))).toBe('not-in-table');
});

describe('noise of a region', () => {
  const region = (slopeAcross: number, slopeDown: number, seed: number, widthPx = 20, height = 55) => {
    const noise = noiseFrom(seed);
    const values = Array.from({ length: widthPx * height }, (_, place) => {
      const [column, row] = [place % widthPx, Math.floor(place / widthPx)];
      return Math.round(20_000 * (1 + slopeAcross * (column / widthPx - 0.5) + slopeDown * (row / height - 0.5) + noise() / 100));
    });
    return { widthPx, values };
  };

  // Made with SNR 100: 1100 pixels know it to 1/√2200 = 2.1 %; three of those.
  test('the slope of the thickness does not count as noise', () => {
    for (let seed = 1; seed <= 20; seed += 1) {
      const flat = valueOf(regionSignal(region(0, 0, seed)));
      const sloped = valueOf(regionSignal(region(0.05, 0.08, seed)));
      expect(Math.abs(flat.signalToNoise / 100 - 1)).toBeLessThan(0.065);
      expect(Math.abs(sloped.signalToNoise / flat.signalToNoise - 1)).toBeLessThan(0.01);
      expect(sloped.slope).toBeCloseTo(Math.hypot(0.05, 0.08), 1);
    }
    const { values } = region(0.05, 0.08, 1);
    const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
    const plain = mean / Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1));
    expect(plain).toBeLessThan(50);
  });

  test('on a slope down the rows the median of row ratios agrees', () => {
    for (let seed = 1; seed <= 10; seed += 1) {
      const given = region(0, 0.1, seed, 55, 40);
      expect(Math.abs(valueOf(medianRowSignalToNoise(given)) / valueOf(regionSignal(given)).signalToNoise - 1)).toBeLessThan(0.1);
    }
  });

  test('scaling the grey values and turning the region round change nothing', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 1000 }), fc.integer({ min: 2, max: 50 }), (seed, times) => {
        const given = region(0.02, -0.03, seed);
        const plain = valueOf(regionSignal(given)).signalToNoise;
        const scaled = valueOf(regionSignal({ ...given, values: given.values.map((value) => value * times) })).signalToNoise;
        const turned = valueOf(regionSignal({ ...given, values: [...given.values].reverse() })).signalToNoise;
        expect(scaled / plain).toBeCloseTo(1, 10);
        expect(turned / plain).toBeCloseTo(1, 10);
      }),
      { numRuns: 100 },
    );
  });

  test('refusals', () => {
    const good = region(0, 0, 1);
    const code = (change: Partial<typeof good & { fullFrom: number }>) => codeOf(regionSignal({ ...good, ...change }));
    expect(code({})).toBe('ok');
    expect(code({ widthPx: 21 })).toBe('region-not-a-rectangle');
    expect(code({ widthPx: 1 })).toBe('region-not-a-rectangle');
    expect(code({ values: good.values.slice(0, 1080) })).toBe('region-too-small');
    expect(code({ values: good.values.map((value, at) => (at === 7 ? Number.NaN : value)) })).toBe('grey-value-missing');
    expect(code({ fullFrom: 20_100 })).toBe('region-saturated');
    expect(code({ values: good.values.map((_, at) => 500 + 3 * (at % 20)) })).toBe('region-without-noise');
    expect(code({ values: good.values.map((value) => value - 30_000) })).toBe('region-without-signal');
    expect(codeOf(medianRowSignalToNoise({ ...good, values: good.values.map(() => 5) }))).toBe('region-without-noise');
  });
});

describe('duplex wires', () => {
  test('dip by hand: wires of 100 and 80, valley 36, is 60 %; no valley is 0 %', () => {
    expect(valueOf(dipPercent(100, 80, 36))).toBe(60);
    expect(valueOf(dipPercent(50, 50, 50))).toBe(0);
    expect(codeOf(dipPercent(0, 10, 0))).toBe('wires-not-above-ground');
  });

  test('a peak is taken from the parabola through its samples', () => {
    const parabola = Array.from({ length: 21 }, (_, at) => 5 - 0.2 * (at - 9.3) ** 2);
    expect(extremeAbout(parabola, 9, 4).most).toBeCloseTo(5, 12);
    expect(extremeAbout(parabola, 9, 4).least).toBeCloseTo(5 - 0.2 * 4.3 ** 2, 12);
    expect(extremeAbout([1, 5, 2], 1, 1)).toEqual({ most: 5, least: 1 });
  });

  // Two wires a gap apart under a Gaussian blur: a dip of 20 % falls where the diameter is √2·σ (theory, from memory).
  test.each([0.05, 0.07, 0.09, 0.11, 0.14, 0.18, 0.22, 0.3])('blur of %s mm without noise', (blurSigmaMm) => {
    const found = valueOf(duplexResolution(gaugeProfile({ blurSigmaMm, stepMm: 0.02, signalToNoise: 1e7, slope: 0.1 })));
    expect(Math.abs(found.interpolatedMm / (Math.SQRT2 * blurSigmaMm) - 1)).toBeLessThan(0.01);
    expect(found.interpolatedMm).toBeGreaterThanOrEqual(found.resolutionMm);
    expect(found.unsharpnessMm).toBe(2 * found.resolutionMm);
  });

  test('with noise the answers lie about the truth, and none far from it', () => {
    for (const blurSigmaMm of [0.09, 0.14, 0.22]) {
      const ratios = Array.from({ length: 12 }, (_, seed) =>
        duplexResolution(gaugeProfile({ blurSigmaMm, stepMm: 0.02, signalToNoise: 400, seed: seed + 1 })),
      )
        .filter((answer): answer is { ok: true; value: DuplexResolution } => answer.ok)
        .map(({ value }) => value.interpolatedMm / (Math.SQRT2 * blurSigmaMm));
      expect(ratios.length).toBeGreaterThan(8);
      expect(Math.abs(ratios.reduce((sum, one) => sum + one, 0) / ratios.length - 1)).toBeLessThan(0.02);
      for (const one of ratios) expect(Math.abs(one - 1)).toBeLessThan(0.1);
    }
  });

  test('neither the scale of grey values, the side the line begins at, nor bright wires change the answer', () => {
    const profile = gaugeProfile({ blurSigmaMm: 0.11, stepMm: 0.02, signalToNoise: 2000 });
    const answer = valueOf(duplexResolution(profile)).interpolatedMm;
    const changed = (values: readonly number[], wires: 'darker' | 'brighter' = 'darker') =>
      valueOf(duplexResolution({ ...profile, values, wires })).interpolatedMm;
    expect(changed(profile.values.map((value) => value * 3 + 100))).toBeCloseTo(answer, 9);
    expect(changed([...profile.values].reverse())).toBeCloseTo(answer, 2);
    expect(
      changed(
        profile.values.map((value) => 65_535 - value),
        'brighter',
      ),
    ).toBeCloseTo(answer, 9);
  });

  test('a ground that bends under the gauge is taken from the gaps beside each pair', () => {
    for (const blurSigmaMm of [0.11, 0.18, 0.25]) {
      const found = valueOf(duplexResolution(gaugeProfile({ blurSigmaMm, stepMm: 0.02, signalToNoise: 1e6, curve: 0.02 })));
      expect(Math.abs(found.interpolatedMm / (Math.SQRT2 * blurSigmaMm) - 1)).toBeLessThan(0.015);
    }
  });

  test('more blur never reads as finer', () => {
    const answers = [0.06, 0.08, 0.1, 0.13, 0.17, 0.21, 0.26].map(
      (blurSigmaMm) => valueOf(duplexResolution(gaugeProfile({ blurSigmaMm, stepMm: 0.02, signalToNoise: 1e6 }))).interpolatedMm,
    );
    expect(answers).toEqual([...answers].sort((a, b) => a - b));
  });

  test('poor profiles are refused by name', () => {
    const good = { blurSigmaMm: 0.11, stepMm: 0.02, signalToNoise: 1e6 };
    const code = (change: Partial<Parameters<typeof gaugeProfile>[0]>) =>
      codeOf(duplexResolution(gaugeProfile({ ...good, ...change })));
    expect(code({ signalToNoise: 30 })).toBe('duplex-contrast-low');
    expect(code({ attenuation: 0.02, signalToNoise: 200 })).toBe('duplex-contrast-low');
    expect(code({ blurSigmaMm: 0.015 })).toBe('duplex-all-resolved');
    expect(code({ pairs: 4 })).toBe('duplex-all-resolved');
    expect(code({ blurSigmaMm: 0.75 })).not.toBe('ok');
    expect(code({ stepMm: 0.4 })).not.toBe('ok');
    const profile = gaugeProfile(good);
    expect(codeOf(duplexResolution({ ...profile, values: profile.values.slice(0, 99) }))).toBe('profile-too-short');
    expect(codeOf(duplexResolution({ ...profile, stepMm: 0 }))).toBe('profile-not-numbers');
    expect(codeOf(duplexResolution({ ...profile, stepMm: 0.05 }))).toBe('gauge-not-recognised');
    expect(codeOf(duplexResolution({ ...profile, wires: 'brighter' }))).toBe('duplex-contrast-low');
    const bright = profile.values.map((value, at) => (at * 0.02 > 5.4 && at * 0.02 < 6.5 ? value + 8000 : value));
    expect(codeOf(duplexResolution({ ...profile, values: bright }))).toMatch(/uneven|recognised|rise/);
    const noise = noiseFrom(3);
    expect(codeOf(duplexResolution({ ...profile, values: profile.values.map(() => 20_000 + noise() * 100) }))).toBe(
      'duplex-contrast-low',
    );
  });
});
