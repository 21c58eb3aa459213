import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  AIR_GAS_CONSTANT,
  criticalPressureRatio,
  effectiveAreaMm2,
  idealFlowGPerS,
  isChoked,
  isentropic,
} from '@/services/engine/methods/airflow/air';
import { dischargeCoefficient } from '@/services/engine/methods/airflow/critical-nozzle';
import { correctedFlow, flowParameter, ratioToMaster } from '@/services/engine/methods/airflow/flow';
import { compare, decimalText, multiply, numberOf, ratio } from '@/services/engine/quantity/decimal';
import { referenceJson, referenceRows, withoutReference } from '../../support/reference';
import { codeOf, exactly as x, figure, valueOf } from './numbers';

interface FlowCase {
  p0_Pa: number;
  p_Pa: number;
  T0_K: number;
  A_mm2: number;
  Cd: number;
  choked: boolean;
  mdot_g_per_s: number;
  flow_parameter_mdot_sqrtT0_over_p0: number;
  effective_area_mm2_back: number;
}
interface Published {
  choked_coeff_SI: number;
  critical_pressure_ratio_p_over_p0: number;
  critical_p0_over_p: number;
  flow_cases: FlowCase[];
  corrected_flow: { W_kg_s: number; T_K: number; p_kPa: number; Wc: number }[];
  ISO9300_Cd_toroidal: Record<string, number>[];
  'ISO9300_Cd_cylindrical_0.9976-0.1388Re^-0.2': { Re: number; Cd: number }[];
  discharge_coefficient: {
    example: {
      mdot_meas_g_s: number;
      p0_Pa: number;
      p_Pa: number;
      T0_K: number;
      A_geo_mm2: number;
      Aeff_mm2: number;
      Cd: number;
    };
  };
}
const kPa = (pascals: number) => ratio(BigInt(pascals), 1000n);
const near = (value: number, expected: number, digits = 7) => {
  expect(Math.abs(value - expected)).toBeLessThanOrEqual(
    0.51 * 10 ** -digits * Math.max(10 ** Math.ceil(Math.log10(Math.abs(expected))), 1e-30),
  );
};

describe.skipIf(withoutReference)('published airflow figures', () => {
  const published = withoutReference ? undefined : referenceJson<Published>('airflow_examples.json');

  // NACA Report 1135, table for γ = 1.4; six figures in the file.
  test('isentropic table', () => {
    const rows = withoutReference ? [] : referenceRows('isentropic_air_g1.4.csv');
    expect(rows.length).toBe(36);
    for (const row of rows) {
      const state = valueOf(isentropic(x(row.M ?? '')));
      near(numberOf(state.pressureRatio), Number(row.p_over_p0), 6);
      near(numberOf(state.densityRatio), Number(row.rho_over_rho0), 6);
      near(numberOf(state.temperatureRatio), Number(row.T_over_T0), 6);
      if (state.areaRatio === null) expect(row.A_over_Astar).toBe('inf');
      else near(numberOf(state.areaRatio), Number(row.A_over_Astar), 6);
      if (row.M !== '0') near(numberOf(state.flowFunction), Number(row.mdot_sqrtT0_over_A_p0_SI), 6);
    }
  });

  test('critical ratio, and the flow function when choked', () => {
    near(numberOf(criticalPressureRatio()), published?.critical_pressure_ratio_p_over_p0 ?? 0, 8);
    near(1 / numberOf(criticalPressureRatio()), published?.critical_p0_over_p ?? 0, 8);
    near(numberOf(valueOf(isentropic(x(1))).flowFunction), published?.choked_coeff_SI ?? 0, 6);
  });

  test('flow, flow parameter and effective area, choked and not', () => {
    for (const one of published?.flow_cases ?? []) {
      const path = { totalPressureKPa: kPa(one.p0_Pa), outletPressureKPa: kPa(one.p_Pa), totalTemperatureK: x(one.T0_K) };
      expect(valueOf(isChoked(path.totalPressureKPa, path.outletPressureKPa))).toBe(one.choked);
      const flow = multiply(valueOf(idealFlowGPerS(x(one.A_mm2), path)), x(one.Cd));
      near(numberOf(flow), one.mdot_g_per_s);
      // kg·√K/(s·Pa) in the file: 10⁻⁹ of mg·√K/(s·kPa).
      near(
        figure(flowParameter(flow, path.totalTemperatureK, path.totalPressureKPa)) * 1e-9,
        one.flow_parameter_mdot_sqrtT0_over_p0,
      );
      near(figure(effectiveAreaMm2(flow, path)), one.effective_area_mm2_back);
    }
    expect(published?.flow_cases.length).toBe(4);
    const example = published?.discharge_coefficient.example;
    const path = {
      totalPressureKPa: kPa(example?.p0_Pa ?? 0),
      outletPressureKPa: kPa(example?.p_Pa ?? 0),
      totalTemperatureK: x(example?.T0_K ?? 0),
    };
    const area = valueOf(effectiveAreaMm2(x(example?.mdot_meas_g_s ?? 0), path));
    near(numberOf(area), example?.Aeff_mm2 ?? 0);
    near(figure(ratioToMaster(area, x(example?.A_geo_mm2 ?? 0))), example?.Cd ?? 0);
  });

  test('corrected flow and discharge coefficients', () => {
    for (const one of published?.corrected_flow ?? [])
      near(figure(correctedFlow(x(one.W_kg_s), x(one.T_K), x(one.p_kPa))), one.Wc);
    for (const one of published?.ISO9300_Cd_toroidal ?? []) {
      near(figure(dischargeCoefficient('toroidal-normal', x(one.Re ?? 0))), one['normally_machined_0.9959-2.720Re^-0.5'] ?? 0);
      near(
        figure(dischargeCoefficient('toroidal-accurate', x(one.Re ?? 0))),
        one['accurately_machined_0.9985-3.412Re^-0.5'] ?? 0,
      );
    }
    for (const one of published?.['ISO9300_Cd_cylindrical_0.9976-0.1388Re^-0.2'] ?? [])
      near(figure(dischargeCoefficient('cylindrical', x(one.Re))), one.Cd);
    expect(published?.ISO9300_Cd_toroidal.length).toBe(3);
  });
});

// By hand from NACA 1135: at Mach 1 T/T₀ is 5/6 exactly, A/A* is 1; at Mach 2 A/A* is 27/16 exactly.
test('round Mach numbers', () => {
  const one = valueOf(isentropic(x(1)));
  expect(compare(one.temperatureRatio, ratio(5n, 6n))).toBe(0);
  expect(one.areaRatio && compare(one.areaRatio, x(1))).toBe(0);
  expect(decimalText(valueOf(isentropic(x(2))).areaRatio ?? x(0), 12)).toBe('1.6875');
  expect(numberOf(AIR_GAS_CONSTANT)).toBe(287.05);
});

test('choked exactly at the critical ratio, not a hair above', () => {
  // (5/6)^3.5 = 0.52828178771…
  expect(valueOf(isChoked(x(1), x('0.5282817877')))).toBe(true);
  expect(valueOf(isChoked(x(1), x('0.5282817878')))).toBe(false);
});

const path = (inlet: number, outlet: number, kelvin: number) => ({
  totalPressureKPa: x(inlet),
  outletPressureKPa: x(outlet),
  totalTemperatureK: x(kelvin),
});

test('less back pressure never passes less, and once choked passes the same', () => {
  fc.assert(
    fc.property(fc.integer({ min: 2, max: 199 }), fc.integer({ min: 1, max: 198 }), (a, b) => {
      fc.pre(a !== b);
      const [low, high] = [Math.min(a, b), Math.max(a, b)];
      const more = valueOf(idealFlowGPerS(x(10), path(200, low, 293)));
      const less = valueOf(idealFlowGPerS(x(10), path(200, high, 293)));
      const order = compare(more, less);
      if (high <= 105) expect(order).toBe(0);
      else expect(order).toBe(1);
    }),
    { numRuns: 300 },
  );
});

test('the flow parameter of one area does not know the day', () => {
  fc.assert(
    fc.property(fc.integer({ min: 250, max: 330 }), fc.integer({ min: 200, max: 900 }), (kelvin, inlet) => {
      const flow = valueOf(idealFlowGPerS(x(7), path(inlet, 100, kelvin)));
      const atStandard = valueOf(idealFlowGPerS(x(7), path(500, 250, 288)));
      expect(figure(flowParameter(flow, x(kelvin), x(inlet)))).toBeCloseTo(figure(flowParameter(atStandard, x(288), x(500))), 9);
    }),
    { numRuns: 200 },
  );
});

test('refusals', () => {
  expect(codeOf(flowParameter(x(1), x(0), x(100)))).toBe('not-above-zero');
  expect(codeOf(correctedFlow(x(1), x(288), x(-1)))).toBe('not-above-zero');
  expect(codeOf(effectiveAreaMm2(x(1), path(100, 100, 290)))).toBe('no-pressure-drop');
  expect(codeOf(effectiveAreaMm2(x(1), path(100, 101, 290)))).toBe('no-pressure-drop');
  expect(codeOf(effectiveAreaMm2(x(0), path(200, 100, 290)))).toBe('not-above-zero');
  expect(codeOf(ratioToMaster(x(1), x(0)))).toBe('not-above-zero');
  expect(codeOf(isentropic(x(-1)))).toBe('below-zero');
  expect(codeOf(dischargeCoefficient('cylindrical', x(0)))).toBe('not-above-zero');
});
