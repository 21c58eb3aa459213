/** A square matrix by rows. */
export type Matrix = readonly (readonly number[])[];

export interface SingularValues {
  /** Columns of U, S in falling order, columns of V: M = Σ S·u·vᵀ. A column of U beside a zero of S is zero. */
  readonly u: Matrix;
  readonly s: readonly number[];
  readonly v: Matrix;
}

const MOST_SWEEPS = 60;
const SETTLED = 1e-15;

function dot(a: readonly number[], b: readonly number[]): number {
  return a.reduce((sum, entry, place) => sum + entry * (b[place] ?? 0), 0);
}

/** Turns two columns so that the angle between them becomes right: (a, b) → (c·a − s·b, s·a + c·b). */
function turn(columns: number[][], p: number, q: number, cosine: number, sine: number): void {
  const first = columns[p] ?? [];
  const second = columns[q] ?? [];
  columns[p] = first.map((entry, place) => cosine * entry - sine * (second[place] ?? 0));
  columns[q] = first.map((entry, place) => sine * entry + cosine * (second[place] ?? 0));
}

/** One-sided Jacobi on two columns; whether anything moved. */
function settlePair(columns: number[][], right: number[][], p: number, q: number): boolean {
  const a = columns[p] ?? [];
  const b = columns[q] ?? [];
  const alpha = dot(a, a);
  const beta = dot(b, b);
  const gamma = dot(a, b);
  if (gamma === 0 || gamma * gamma <= SETTLED * SETTLED * alpha * beta) return false;
  const zeta = (beta - alpha) / (2 * gamma);
  const tangent = (zeta < 0 ? -1 : 1) / ((zeta < 0 ? -zeta : zeta) + Math.sqrt(1 + zeta * zeta));
  const cosine = 1 / Math.sqrt(1 + tangent * tangent);
  turn(columns, p, q, cosine, cosine * tangent);
  turn(right, p, q, cosine, cosine * tangent);
  return true;
}

/**
 * Singular values of a small matrix given by its columns, by one-sided Jacobi rotations (Hestenes 1958): + − × ÷ √ only.
 * Answers columns of U and V beside each value, largest first.
 */
export function singularValues(given: Matrix): SingularValues {
  const size = given.length;
  const columns = given.map((column) => [...column]);
  const right = given.map((_, place) => Array.from({ length: size }, (__, at) => (at === place ? 1 : 0)));
  for (let sweep = 0; sweep < MOST_SWEEPS; sweep += 1) {
    let moved = false;
    for (let p = 0; p < size - 1; p += 1) for (let q = p + 1; q < size; q += 1) moved = settlePair(columns, right, p, q) || moved;
    if (!moved) break;
  }
  const rows = columns.map((column, place) => ({ s: Math.sqrt(dot(column, column)), column, v: right[place] ?? [] }));
  rows.sort((a, b) => b.s - a.s);
  return {
    u: rows.map(({ s, column }) => column.map((entry) => (s === 0 ? 0 : entry / s))),
    s: rows.map(({ s }) => s),
    v: rows.map(({ v }) => v),
  };
}
