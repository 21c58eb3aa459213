import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { densityGPerCm3, massInVacuumG, volumeCm3 } from '@/services/engine/methods/weighing/density';
import { compare, decimalText, multiply, ratio, subtract } from '@/services/engine/quantity/decimal';
import { referenceJson, referenceRows, withoutReference } from '../../support/reference';
import { codeOf, exactly as x, figure, valueOf } from './numbers';

interface Published {
  archimedes: {
    m_air_g: number;
    m_fluid_g: number;
    rho_fluid_g_cm3: number;
    rho_air: number;
    rho_g_cm3: number;
    volume_cm3: number;
  }[];
}

describe.skipIf(withoutReference)('published weighings', () => {
  test('density and volume by immersion', () => {
    const { archimedes } = referenceJson<Published>('core_shift_density.json');
    expect(archimedes.length).toBe(3);
    for (const one of archimedes) {
      const given = {
        inAirG: x(one.m_air_g),
        inLiquidG: x(one.m_fluid_g),
        liquidGPerCm3: x(one.rho_fluid_g_cm3),
        airGPerCm3: x(one.rho_air),
      };
      expect(figure(densityGPerCm3(given))).toBeCloseTo(one.rho_g_cm3, 7);
      expect(Math.abs(figure(volumeCm3(given)) / one.volume_cm3 - 1)).toBeLessThan(1e-7);
    }
  });

  // Handbook densities of the alloys (from memory); cast parts lie within half a percent of them.
  test('the densities found are those of alloys', () => {
    const { archimedes } = referenceJson<Published>('core_shift_density.json');
    const rows = referenceRows('nickel_alloy_density.csv');
    const alloys = ['IN718', 'MAR-M 247', 'Ti-6Al-4V'];
    archimedes.forEach((one, place) => {
      const handbook = Number(rows.find(({ alloy }) => alloy === alloys[place])?.density_g_cm3);
      const found = densityGPerCm3({
        inAirG: x(one.m_air_g),
        inLiquidG: x(one.m_fluid_g),
        liquidGPerCm3: x(one.rho_fluid_g_cm3),
        airGPerCm3: x(one.rho_air),
      });
      expect(Math.abs(figure(found) / handbook - 1)).toBeLessThan(0.005);
    });
  });
});

const given = (air: string, liquid: string, liquidDensity = '1', airDensity = '0') => ({
  inAirG: x(air),
  inLiquidG: x(liquid),
  liquidGPerCm3: x(liquidDensity),
  airGPerCm3: x(airDensity),
});

// By hand: 80 g in air and 70 g in a liquid of 1 g/cm³ is 10 cm³ and 8 g/cm³.
test('by hand, exactly', () => {
  expect(decimalText(valueOf(densityGPerCm3(given('80', '70'))), 12)).toBe('8');
  expect(decimalText(valueOf(volumeCm3(given('80', '70'))), 12)).toBe('10');
});

// By hand (OIML D 28): parts of 8 g/cm³ weigh true; 2.7 g/cm³ in air of 0.0012: ×(1 − 0.00015)/(1 − 0.000444…) = 1.000294575.
test('air buoyancy', () => {
  expect(compare(valueOf(massInVacuumG(x('123.456'), x(8), x('0.0012'))), x('123.456'))).toBe(0);
  expect(figure(massInVacuumG(x(1000), x('2.7'), x('0.0012')))).toBeCloseTo(1000.2945754, 6);
  expect(compare(valueOf(massInVacuumG(x(5), x(3), x(0))), x(5))).toBe(0);
});

test('a part made of density ρ and weighed by the law of buoyancy shows ρ again', () => {
  const part = fc.integer({ min: 1500, max: 20_000 }).map((n) => ratio(BigInt(n), 1000n));
  const air = fc.integer({ min: 0, max: 1300 }).map((n) => ratio(BigInt(n), 1_000_000n));
  const liquid = fc.integer({ min: 700, max: 1400 }).map((n) => ratio(BigInt(n), 1000n));
  fc.assert(
    fc.property(part, air, liquid, (density, airDensity, liquidDensity) => {
      const weighed = (medium: typeof density) => multiply(x(12), subtract(density, medium));
      const found = densityGPerCm3({
        inAirG: weighed(airDensity),
        inLiquidG: weighed(liquidDensity),
        liquidGPerCm3: liquidDensity,
        airGPerCm3: airDensity,
      });
      expect(compare(valueOf(found), density)).toBe(0);
    }),
    { numRuns: 1000 },
  );
});

test('refusals', () => {
  expect(codeOf(densityGPerCm3(given('80', '80')))).toBe('no-buoyancy');
  expect(codeOf(densityGPerCm3(given('80', '81')))).toBe('no-buoyancy');
  expect(codeOf(densityGPerCm3(given('0', '0')))).toBe('not-above-zero');
  expect(codeOf(volumeCm3(given('80', '-1')))).toBe('below-zero');
  expect(codeOf(volumeCm3(given('80', '70', '1', '1')))).toBe('air-denser-than-liquid');
  expect(codeOf(massInVacuumG(x(1), x('0.001'), x('0.0012')))).toBe('part-no-denser-than-air');
});
