import { positive, resultOf, single } from '../derived-quantity';
import type { DerivedQuantity } from '../derived-quantity';
import { effectiveAreaMm2, isChoked } from './air';
import { correctedFlow, flowParameter, ratioToMaster } from './flow';

const method = 'airflow';
const flow = positive('flow', 'g/s');
const temperature = positive('total-temperature', 'K');
const pressure = positive('total-pressure', 'kPa');

/** What an airflow rig derives, as quantities that a plan can name. Temperatures and pressures are totals and absolute. */
export const airflowQuantities: readonly DerivedQuantity[] = [
  {
    name: 'flow-parameter',
    method,
    inputs: [flow, temperature, pressure],
    unit: 'mg·√K/(s·kPa)',
    places: 6,
    source: 'NACA Report 1135: W·√T/p',
    compute: (given) =>
      single(flowParameter(given.value('flow'), given.value('total-temperature'), given.value('total-pressure'))),
  },
  {
    name: 'corrected-flow',
    method,
    inputs: [flow, temperature, pressure],
    unit: 'g/s',
    places: 6,
    source: 'W·√θ/δ at 288.15 K and 101.325 kPa',
    compute: (given) =>
      single(correctedFlow(given.value('flow'), given.value('total-temperature'), given.value('total-pressure'))),
  },
  {
    name: 'effective-area',
    method,
    inputs: [flow, temperature, pressure, positive('outlet-pressure', 'kPa')],
    unit: 'mm²',
    places: 6,
    source: 'NACA Report 1135, γ = 1.4, R = 287.05 J/(kg·K); choked by ISO 9300',
    compute: (given) => {
      const path = {
        totalPressureKPa: given.value('total-pressure'),
        outletPressureKPa: given.value('outlet-pressure'),
        totalTemperatureK: given.value('total-temperature'),
      };
      const choked = isChoked(path.totalPressureKPa, path.outletPressureKPa);
      return resultOf(effectiveAreaMm2(given.value('flow'), path), (value) => ({
        value,
        steps: [{ name: 'choked', value: choked.ok && choked.value ? 1 : 0, unit: '1' }],
      }));
    },
  },
  {
    name: 'flow-ratio-to-master',
    method,
    inputs: [positive('part-flow-parameter', 'mg·√K/(s·kPa)'), positive('master-flow-parameter', 'mg·√K/(s·kPa)')],
    unit: '1',
    places: 6,
    source: 'part over master on the same rig',
    compute: (given) => single(ratioToMaster(given.value('part-flow-parameter'), given.value('master-flow-parameter'))),
  },
];
