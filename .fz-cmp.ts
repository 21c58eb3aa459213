import { evaluate as nu } from './services/engine/evaluate/evaluate';
import { evaluate as old } from '/tmp/old/services/engine/evaluate/evaluate';
let seed = Number(process.argv[2] ?? 3); const rnd = () => { seed = (seed * 1664525 + 1013904223) >>> 0; return seed / 4294967296; };
const int = (a: number, b: number) => Math.floor(a + rnd() * (b - a + 1)); const pick = <T,>(l: T[]) => l[int(0, l.length - 1)]!;
const d = (a: number, b: number) => (int(a, b) / 100).toFixed(pick([1, 2]));
function shape(): any { const c = [int(0, 50) * 100, int(0, 50) * 100]; const g = () => int(-8, 8) * 50;
  switch (pick(['c', 'e', 'l', 'p', 'c'])) { case 'c': return { kind: 'circle', center: c, diameter: int(1, 16) * 50 }; case 'e': return { kind: 'ellipse', center: c, axes: [int(1, 16) * 50, int(1, 8) * 50], angle: pick([0, 30, 90, 45, 17.5]) };
    case 'l': return { kind: 'polyline', points: [c, [c[0]! + int(1, 8) * 50, c[1]! + g()], [c[0]! + g(), c[1]! + g() + 1]], width: int(1, 4) * 50 };
    default: return { kind: 'polygon', points: [c, [c[0]! + int(1, 8) * 50, c[1]!], [c[0]! + g(), c[1]! + int(1, 8) * 50]] }; } }
const rule = (): any => { const f = { class: pick([undefined, undefined, 'linear', 'rounded']), types: pick([undefined, undefined, ['gas-pore'], ['inclusion', 'crack']]) };
  switch (int(0, 7)) { case 0: return { kind: 'not-allowed', types: pick([undefined, ['inclusion']]), classes: ['linear'] }; case 1: return { kind: 'max-size', ...f, limit: d(20, 120) }; case 2: return { kind: 'size-bands', ...f, counting: pick(['each-band', 'this-band-and-above']), bands: [{ to: '0.25', count: null }, { to: '0.50', count: int(0, 3) }, { to: '0.9', count: int(0, 2) }] }; case 3: return { kind: 'max-count', ...f, limit: int(0, 6) };
    case 4: return { kind: 'min-separation', ...f, limit: d(0, 150) }; case 5: return { kind: 'max-total-length', ...f, limit: d(10, 400) }; case 6: return { kind: 'max-total-area', ...f, limit: d(1, 200) }; default: return { kind: 'max-severity', category: 'gas-holes', reference: 'R', limit: int(0, 3), requiredFor: pick([undefined, ['inclusion']]), ...f }; } };
let diffs = 0, rows = 0; const verd: any = {};
for (let k = 0; k < 400; k++) {
  const methods = ['penetrant', 'radiography'];
  const body = JSON.parse(JSON.stringify({ criteria: { lengthUnit: pick(['mm', 'mm', 'in']), linear: { ratio: pick(['3', '2', '1.5']), at: pick(['above', 'at-or-above']) }, zones: [{ id: 'A', view: 'v', polygon: [[0, 0], [2500, 0], [2500, 5000], [0, 5000]] }, { id: 'B', view: 'v', polygon: [[2500, 0], [5000, 0], [5000, 5000], [2500, 5000]] }, { id: 'C', view: 'w', polygon: [[0, 0], [5000, 0], [2500, 5000]] }],
    indicationRules: Array.from({ length: 2 }, (_, i) => ({ id: 'S' + i, zones: pick([['A'], ['B', 'A'], ['A', 'B', 'C']]), methods: pick([['penetrant'], ['*'], methods]), types: pick([['*'], ['gas-pore', 'crack']]), cracksAllowed: pick([null, 'yes']), recordable: pick([undefined, '0.2', '0.30']), merge: pick([undefined, { within: d(5, 50) }, { factor: pick(['1', '0.5', '0.33']), of: pick(['larger', 'smaller']) }]), rules: Array.from({ length: 4 }, rule) })) },
    observations: { methods: ['penetrant'], indications: [] as any[] } }));
  if (body.criteria.lengthUnit === 'in') for (const s of body.criteria.indicationRules) { const sc = (x: string) => (Number(x) / 25).toFixed(4); if (s.recordable) s.recordable = sc(s.recordable); if (s.merge?.within) s.merge.within = sc(s.merge.within) === '0.0000' ? '0.001' : sc(s.merge.within); for (const r of s.rules) { if (typeof r.limit === 'string') r.limit = r.kind === 'max-total-area' ? (Number(r.limit) / 645).toFixed(6) : sc(r.limit); r.bands?.forEach((b: any) => (b.to = sc(b.to))); } }
  const n = int(1, 14); for (let i = 0; i < n; i++) body.observations.indications.push(JSON.parse(JSON.stringify({ id: 'i' + i, method: pick(body.observations.methods), type: pick(['gas-pore', 'inclusion', 'gas-pore', 'crack', 'gas-pore']), view: pick(['v', 'v', 'w']), shape: shape(), severity: pick([undefined, { category: 'gas-holes', level: int(0, 4), reference: pick(['R', 'R', 'Q']) }]) })));
  const a = nu(body), b = old(body);
  if (a.ok !== b.ok) { diffs++; console.log('ok', a.ok || a.faults, b.ok || b.faults); continue; }
  if (!a.ok || !b.ok) continue;
  const strip = (r: any) => { const { sentence, limit, ...x } = r; return JSON.stringify(x); };
  a.answer.rules.forEach((r, i) => { rows++; verd[r.verdict] = (verd[r.verdict] ?? 0) + 1; if (strip(r) !== strip(b.answer.rules[i]) && r.kind !== 'max-severity') { diffs++; if (diffs < 25) console.log(strip(r), '\n', strip(b.answer.rules[i]), JSON.stringify(body.criteria.indicationRules.find((s: any) => s.id === r.rule).rules[r.index])); } });
  const ia = JSON.stringify(a.answer.indications), ib = JSON.stringify(b.answer.indications); if (ia !== ib) { diffs++; if (diffs < 25) { a.answer.indications.forEach((x, i) => { if (JSON.stringify(x) !== JSON.stringify(b.answer.indications[i])) console.log('ind', JSON.stringify(x), JSON.stringify(b.answer.indications[i]), JSON.stringify(body.observations.indications.find((z: any) => z.id === x.id))); }); } }
  if (JSON.stringify(a.answer.unjudged) !== JSON.stringify(b.answer.unjudged)) { diffs++; console.log('unjudged', a.answer.unjudged, b.answer.unjudged); }
  if (a.answer.verdict !== b.answer.verdict) console.log('verdict', a.answer.verdict, b.answer.verdict);
}
console.log({ diffs, rows, verd });
