import { expect, test } from 'vitest';
import { evaluate } from '@/services/engine/evaluate/evaluate';

/** A repeatable scatter, so that a slow run can be run again. */
function scatter(count: number, widthUm: number, heightUm: number): object[] {
  let state = 20;
  const upTo = (limit: number) => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return Math.floor((state / 2 ** 32) * limit);
  };
  return Array.from({ length: count }, (_, at) => {
    const [x, y] = [upTo(widthUm), upTo(heightUm)];
    const shapes = [
      { kind: 'circle', center: [x, y], diameter: 100 + upTo(500) },
      { kind: 'ellipse', center: [x, y], axes: [100 + upTo(800), 100 + upTo(400)], angle: upTo(180) },
      {
        kind: 'polyline',
        points: [
          [x, y],
          [x + 50 + upTo(800), y + upTo(500)],
          [x + 1000 + upTo(500), y + upTo(500)],
        ],
        width: 100,
      },
      {
        kind: 'polygon',
        points: [
          [x, y],
          [x + 100 + upTo(400), y + upTo(50)],
          [x + 50 + upTo(150), y + 100 + upTo(400)],
        ],
      },
    ];
    return { id: String(at), method: 'penetrant', type: 'gas-pore', view: 'v', shape: shapes[at % 4] };
  });
}

function body(indications: readonly object[], widthUm: number, heightUm: number, merge: object, gap: string): unknown {
  const windows = (['circle', 'square'] as const).map((shape) => ({ shape, size: '25' }));
  const rules = [
    { kind: 'not-allowed', classes: ['linear'] },
    { kind: 'max-size', class: 'rounded', limit: '0.75' },
    {
      kind: 'size-bands',
      counting: 'each-band',
      bands: [
        { to: '0.25', count: null },
        { to: '0.50', count: 5 },
      ],
    },
    { kind: 'max-count', limit: 6 },
    ...windows.map((window) => ({ kind: 'max-count-in-window', window, limit: 3 })),
    { kind: 'min-separation', limit: '1.5' },
    ...windows.map((window) => ({ kind: 'max-total-area', limit: '2', window })),
    { kind: 'max-total-length', limit: '4' },
    { kind: 'alignment', count: 4, stripWidth: '1.0', gap },
  ];
  const polygon = [
    [0, 0],
    [widthUm, 0],
    [widthUm, heightUm],
    [0, heightUm],
  ];
  return {
    criteria: {
      lengthUnit: 'mm',
      linear: { ratio: '3', at: 'above' },
      zones: [{ id: 'B', view: 'v', polygon }],
      indicationRules: [{ id: 'N', zones: ['B'], methods: ['penetrant'], types: ['*'], recordable: '0.1', merge, rules }],
    },
    observations: { methods: ['penetrant'], indications },
  };
}

// The contract of the evaluate call: 2,000 indications within 5 s, all rules together; the limit here leaves room for a busy machine.
test.each([
  ['far apart', 400000, 250000, { within: '0.5' }, '2.0'],
  ['crowded', 40000, 25000, { factor: '1', of: 'larger' }, '0.2'],
])('2,000 indications %s are judged within the time of a call', { timeout: 60_000 }, (_how, width, height, merge, gap) => {
  const asked = body(scatter(2000, width, height), width, height, merge, gap);
  const started = performance.now();
  const answer = evaluate(asked);
  const tookMs = performance.now() - started;
  expect(answer.ok && answer.answer.rules.length).toBe(12);
  expect(tookMs).toBeLessThan(10_000);
});

test('an alignment among 2,000 that all hang together is refused by name', { timeout: 60_000 }, () => {
  const answer = evaluate(body(scatter(2000, 40000, 25000), 40000, 25000, { within: '0.5' }, '5.0'));
  expect(answer.ok ? [] : answer.faults.map((one) => one.path)).toEqual(['criteria.indicationRules.0.rules.10']);
});

test('an alignment among 200 that all hang together is always judged', { timeout: 60_000 }, () => {
  const answer = evaluate(body(scatter(200, 8000, 5000), 8000, 5000, { within: '0.01' }, '5.0'));
  expect(answer.ok && answer.answer.rules[11]?.verdict).toBe('reject');
});
