import { evaluate } from './services/engine/evaluate/evaluate';
let seed = 11; const rnd = () => { seed = (seed * 1664525 + 1013904223) >>> 0; return seed / 4294967296; };
const int = (a: number, b: number) => Math.floor(a + rnd() * (b - a + 1));
function run(name: string, W: number, H: number, kinds: string[], merge: any, gap: string, align = true) {
  const ind = Array.from({ length: 2000 }, (_, i) => { const c = [int(0, W), int(0, H)]; const k = kinds[i % kinds.length];
    const shape = k === 'circle' ? { kind: k, center: c, diameter: int(100, 600) } : k === 'ellipse' ? { kind: k, center: c, axes: [int(100, 900), int(100, 500)], angle: int(0, 179) } : k === 'polyline' ? { kind: k, points: [c, [c[0]! + int(50, 900), c[1]! + int(0, 500)], [c[0]! + int(1000, 1500), c[1]! + int(0, 500)]], width: 100 } : { kind: 'polygon', points: [c, [c[0]! + int(100, 500), c[1]! + int(0, 50)], [c[0]! + int(50, 200), c[1]! + int(100, 500)]] };
    return { id: String(i), method: 'penetrant', type: 'gas-pore', view: 'v', shape }; });
  const body = { criteria: { lengthUnit: 'mm', linear: { ratio: '3', at: 'above' }, zones: [{ id: 'B', view: 'v', polygon: [[0, 0], [W, 0], [W, H], [0, H]] }], indicationRules: [{ id: 'N', zones: ['B'], methods: ['penetrant'], types: ['*'], recordable: '0.1', merge,
    rules: [{ kind: 'not-allowed', classes: ['linear'] }, { kind: 'max-size', limit: '0.75', class: 'rounded' }, { kind: 'size-bands', counting: 'each-band', bands: [{ to: '0.25', count: null }, { to: '0.5', count: 5 }] }, { kind: 'max-count', limit: 6 },
    { kind: 'max-count-in-window', window: { shape: 'circle', size: '25' }, limit: 3 }, { kind: 'max-count-in-window', window: { shape: 'square', size: '25' }, limit: 3 }, { kind: 'min-separation', limit: '1.5' }, { kind: 'max-total-length', limit: '4' }, { kind: 'max-total-area', limit: '2', window: { shape: 'square', size: '25' } }, { kind: 'max-total-length', limit: '2', window: { shape: 'circle', size: '25' } }, ...(align ? [{ kind: 'alignment', count: 4, stripWidth: '1', gap }] : [])] }] }, observations: { methods: ['penetrant'], indications: ind } };
  const t = performance.now(); const r = evaluate(JSON.parse(JSON.stringify(body))); const ms = performance.now() - t;
  console.log(name, Math.round(ms), 'ms', r.ok ? r.answer.rules.map((x) => `${x.kind}:${x.measured}`).join(' ') : r.faults);
}
const all = ['circle', 'ellipse', 'polyline', 'polygon'];
for (const [W, H] of [[40000, 25000], [400000, 250000]] as const) for (const kinds of [all, ['circle'], ['ellipse']]) for (const m of [undefined, { within: '0.5' }, { factor: '1', of: 'larger' }]) run(`${W} ${kinds.length > 1 ? 'mix' : kinds[0]} ${JSON.stringify(m)}`, W, H, kinds, m, W > 100000 ? '2.0' : '0.2');
run('gap2 dense', 40000, 25000, all, undefined, '2.0');
