import { describe, expect, test } from 'vitest';
import type { AuthorisationRow, VisionRow } from '@/db/repositories/act-conditions';
import { blockSteps, stepWithin } from '@/services/contracts/block-check';
import { inspectionContent } from '@/services/contracts/inspection-content';
import { judgeInput, type AskEngine } from '@/services/contracts/live-judgement';
import { criteriaOfRequirement, judgingInput, uncertaintyFor } from '@/services/contracts/judging-input';
import { planRequirement } from '@/services/contracts/plan-content';
import { instantOf } from '@/services/inspections/acts-on-record';
import { checkStanding } from '@/services/inspections/check-covers';
import { decimalsOf } from '@/services/inspections/store-signed';
import { personStanding } from '@/services/inspections/person-counts';
import { monthsBefore, plantDay } from '@/services/inspections/plant-day';

describe('days of the plant', () => {
  test('an instant late in the UTC day is already tomorrow east of Greenwich', () => {
    expect(plantDay('2026-06-30T23:30:00.000000Z', 'Europe/London')).toBe('2026-07-01');
    expect(plantDay('2026-01-31T23:30:00.000000Z', 'Europe/London')).toBe('2026-01-31');
  });

  test('months before, over a year and at a short month', () => {
    expect(monthsBefore('2026-03-09', 12)).toBe('2025-03-09');
    expect(monthsBefore('2026-03-31', 1)).toBe('2026-02-28');
    expect(monthsBefore('2024-02-29', 12)).toBe('2023-02-28');
    expect(monthsBefore('2026-01-15', 1)).toBe('2025-12-15');
  });

  test('entered times become instants; a date or a word does not', () => {
    expect(instantOf('2026-03-09T15:05:06.5+01:00')).toBe('2026-03-09T14:05:06.500000Z');
    expect(instantOf('2026-03-09T14:05Z')).toBe('2026-03-09T14:05:00.000000Z');
    expect([instantOf('2026-03-09'), instantOf('yesterday'), instantOf('2026-13-40T00:00Z'), instantOf(null)]).toEqual([
      null,
      null,
      null,
      null,
    ]);
  });
});

describe('a person counts', () => {
  const question = {
    accountId: 'a',
    name: 'Robin',
    method: 'penetrant',
    technique: 'PT-1',
    at: '2026-03-09T10:00:00.000000Z',
    day: '2026-03-09',
  };
  const authorisation: AuthorisationRow = {
    id: '1',
    accountId: 'a',
    technique: null,
    level: '2',
    products: null,
    validFrom: '2025-01-01',
    validTo: '2026-03-09',
    withdrawnAt: null,
  };
  const near: VisionRow = {
    id: '2',
    accountId: 'a',
    test: 'near-vision',
    result: 'pass',
    corrected: true,
    testedOn: '2025-03-09',
  };
  const colour: VisionRow = {
    id: '3',
    accountId: 'a',
    test: 'colour-perception',
    result: 'pass',
    corrected: false,
    testedOn: '2021-03-09',
  };

  test('on the last day of everything', () => {
    expect(personStanding(question, [authorisation], [near, colour]).reasons).toEqual([]);
  });

  test.each([
    ['no authorisation', [], [near, colour], 'not authorised'],
    ['another technique', [{ ...authorisation, technique: 'PT-2' }], [near, colour], 'not authorised'],
    ['ended yesterday', [{ ...authorisation, validTo: '2026-03-08' }], [near, colour], 'ended on 2026-03-08'],
    ['level 1', [{ ...authorisation, level: '1' as const }], [near, colour], 'level 1'],
    ['withdrawn before', [{ ...authorisation, withdrawnAt: '2026-03-09T09:59:59.000000Z' }], [near, colour], 'withdrawn'],
    ['near vision a day too old', [authorisation], [{ ...near, testedOn: '2025-03-08' }, colour], 'near vision'],
    [
      'near vision failed since',
      [authorisation],
      [{ ...near, result: 'fail' as const, testedOn: '2026-01-01' }, near, colour],
      'did not pass',
    ],
    ['colour a day too old', [authorisation], [near, { ...colour, testedOn: '2021-03-08' }], 'colour perception'],
  ])('not: %s', (_name, rows, tests, words) => {
    const { reasons } = personStanding(question, rows, tests);
    expect(reasons).toHaveLength(1);
    expect(reasons[0]).toContain(words);
  });

  test('withdrawn after the act still counts for the act', () => {
    expect(
      personStanding(question, [{ ...authorisation, withdrawnAt: '2026-03-09T10:00:01.000000Z' }], [near, colour]).reasons,
    ).toEqual([]);
  });
});

describe('process checks', () => {
  const at = '2026-03-09T10:00:00.000000Z';
  const good = {
    id: '1',
    scope: 'line 1',
    title: 'Panel',
    kind: 'opening',
    result: 'good',
    at: '2026-03-09T06:00:00.000000Z',
    validUntil: '2026-03-09T14:00:00.000000Z',
  } as const;
  test('good in its time; run out, failed or absent otherwise; a failed closing check takes a bracketing one back', () => {
    const state = (before: Parameters<typeof checkStanding>[2]['before'], after?: Parameters<typeof checkStanding>[2]['after']) =>
      checkStanding('line 1', at, { before, after }).state;
    expect(state(good)).toBe('good');
    expect(state({ ...good, validUntil: '2026-03-09T09:59:59.999999Z' })).toBe('missed');
    expect(state({ ...good, result: 'failed' })).toBe('failed');
    expect(state(undefined)).toBe('missed');
    expect(
      state(
        { ...good, kind: 'bracketing' },
        { ...good, kind: 'bracketing', result: 'failed', at: '2026-03-09T12:00:00.000000Z' },
      ),
    ).toBe('failed');
    expect(checkStanding('line 1', at, { before: { ...good, kind: 'bracketing' }, after: undefined }).awaitsClosing).toBe(true);
  });
});

describe('a step block', () => {
  test('is compared exactly: 0.1 + 0.2 style sums do not leak in', () => {
    expect(stepWithin('0.3', '0.1', '0.2')).toBe(true);
    expect(stepWithin('1.0200000000000001', '1', '0.02')).toBe(false);
    expect(stepWithin('-0.02', '0.00', '0.02')).toBe(true);
    expect(stepWithin('1,01', '1.00', '0.02')).toBeNull();
  });

  test('a step without a reading is open', () => {
    const acts = inspectionContent.parse({ acts: [{ kind: 'block-check-before', values: { '1.00': ' 1.01 ' } }] }).acts;
    const steps = blockSteps({ unit: 'mm', steps: [{ nominal: '1.00', tolerance: '0.02' }] }, acts);
    expect(steps.map(({ when, within }) => [when, within])).toEqual([
      ['block-check-before', true],
      ['block-check-after', null],
    ]);
  });
});

describe('what the engine is asked', () => {
  const criteria = {
    lengthUnit: 'mm',
    linear: { ratio: '3', at: 'above' },
    characteristics: [{ number: '12' }, { number: '13' }],
    attributes: [{ number: '40' }],
    process: [{ number: 'P3' }],
    zones: [
      { id: 'A', view: 'convex' },
      { id: 'B', view: 'concave' },
      { id: 'C', view: 'concave' },
    ],
    indicationRules: [
      { id: 'N7', zones: ['B'] },
      { id: 'N8', zones: ['A'] },
    ],
  };
  const wall = planRequirement.parse({ operation: '40', title: 'Wall', method: 'ultrasonic-thickness', characteristics: ['12'] });
  const penetrant = planRequirement.parse({
    operation: '50',
    title: 'Penetrant',
    method: 'penetrant',
    views: ['concave'],
    indicationRules: ['N7'],
    process: ['P3'],
  });
  const uncertainties = [
    { characteristic: '12', gaugeKind: 'contact', expanded: '0.020', k: '2', unit: 'mm' },
    { characteristic: '12', gaugeKind: 'immersion', expanded: '0.008', k: '2', unit: 'mm' },
  ];

  test('only what the requirement asks, with the zones of its rules and views', () => {
    expect(criteriaOfRequirement(criteria, wall)).toEqual({
      characteristics: [{ number: '12' }],
      attributes: [],
      process: [],
      zones: [],
      indicationRules: [],
    });
    expect(criteriaOfRequirement(criteria, penetrant)).toMatchObject({
      lengthUnit: 'mm',
      zones: [{ id: 'B' }, { id: 'C' }],
      indicationRules: [{ id: 'N7' }],
      characteristics: [],
    });
  });

  test('the uncertainty follows the gauge used; while none is named the largest stands', () => {
    expect(uncertaintyFor('12', { uncertainties, gaugeKinds: ['immersion'] })?.expanded).toBe('0.008');
    expect(uncertaintyFor('12', { uncertainties, gaugeKinds: [] })?.expanded).toBe('0.020');
    expect(uncertaintyFor('12', { uncertainties, gaugeKinds: ['caliper'] })).toBeUndefined();
  });

  test('blank fields are not given; a method counts once examined', () => {
    const content = inspectionContent.parse({
      readings: [{ characteristic: '12', value: ' ', unit: 'mm' }],
      process: [{ number: 'P3', value: '', unit: 'min' }],
    });
    const source = { plan: { criteria }, requirement: penetrant, content, uncertainties, gaugeKinds: [] };
    expect(judgingInput(source).observations).toEqual({
      methods: [],
      readings: [],
      attributes: [],
      process: [],
      indications: [],
    });
    expect(judgingInput({ ...source, content: { ...content, examined: true } }).observations.methods).toEqual(['penetrant']);
  });

  test('faulty rows are named by their place in the draft and left out', () => {
    const content = inspectionContent.parse({
      readings: ['', 'NaN', '0.9'].map((value) => ({ characteristic: '12', value, unit: 'mm' })),
    });
    const asked = judgingInput({ plan: { criteria }, requirement: wall, content, uncertainties: [], gaugeKinds: [] });
    const seen: unknown[] = [];
    const engine: AskEngine = (body) => {
      const { readings } = body.observations as { readings: { value: string }[] };
      seen.push(readings.map(({ value }) => value));
      const wrong = readings.findIndex(({ value }) => value === 'NaN');
      return {
        faults:
          wrong < 0
            ? [{ path: 'criteria.x', message: 'stop here' }]
            : [{ path: `observations.readings.${String(wrong)}.value`, message: 'no decimal' }],
      };
    };
    expect(judgeInput(asked, engine).faults).toEqual([
      { path: 'readings.1.value', message: 'no decimal' },
      { path: 'criteria.x', message: 'stop here' },
    ]);
    expect(seen).toEqual([['NaN', '0.9'], ['0.9']]);
  });

  test('digits recorded', () => {
    expect(['0.10', '10', '-0.750'].map(decimalsOf)).toEqual([2, 0, 3]);
  });
});
