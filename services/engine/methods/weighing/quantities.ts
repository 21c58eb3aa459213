import { positive, resultOf, single } from '../derived-quantity';
import type { DerivedQuantity, Given, InputForm } from '../derived-quantity';
import { densityGPerCm3, massInVacuumG, volumeCm3 } from './density';
import type { Immersion } from './density';

const method = 'mass';
const air: InputForm = { kind: 'value', name: 'air-density', unit: 'g/cm³', bound: 'not-below-zero', otherwise: '0.0012' };
const immersion: readonly InputForm[] = [
  positive('weight-in-air', 'g'),
  { kind: 'value', name: 'weight-in-liquid', unit: 'g', bound: 'not-below-zero' },
  positive('liquid-density', 'g/cm³'),
  air,
];

function immersionOf(given: Given): Immersion {
  return {
    inAirG: given.value('weight-in-air'),
    inLiquidG: given.value('weight-in-liquid'),
    liquidGPerCm3: given.value('liquid-density'),
    airGPerCm3: given.value('air-density'),
  };
}

/** Density, volume and true mass as quantities that a plan can name. Air is 1.2 kg/m³ unless entered. */
export const weighingQuantities: readonly DerivedQuantity[] = [
  {
    name: 'density-by-immersion',
    method,
    inputs: immersion,
    unit: 'g/cm³',
    places: 6,
    source: 'buoyancy: m_a(ρ_f − ρ_a)/(m_a − m_f) + ρ_a',
    compute: (given) => {
      const volume = volumeCm3(immersionOf(given));
      return resultOf(densityGPerCm3(immersionOf(given)), (value) => ({
        value,
        steps: volume.ok ? [{ name: 'volume', value: volume.value, unit: 'cm³' }] : [],
      }));
    },
  },
  {
    name: 'volume-by-immersion',
    method,
    inputs: immersion,
    unit: 'cm³',
    places: 6,
    source: 'buoyancy: (m_a − m_f)/(ρ_f − ρ_a)',
    compute: (given) => single(volumeCm3(immersionOf(given))),
  },
  {
    name: 'mass-without-buoyancy',
    method,
    inputs: [positive('weight-in-air', 'g'), positive('part-density', 'g/cm³'), air],
    unit: 'g',
    places: 6,
    source: 'OIML D 28: W·(1 − ρ_a/8)/(1 − ρ_a/ρ)',
    compute: (given) =>
      single(massInVacuumG(given.value('weight-in-air'), given.value('part-density'), given.value('air-density'))),
  },
];
