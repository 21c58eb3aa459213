import { divide, multiply, subtract } from './decimal';
import type { Rational } from './decimal';
import { reduced, sumOf } from './roots';

/**
 * Solves as many linear equations as unknowns exactly. Null when they do not determine the unknowns: with exact numbers
 * that is a plain question, not one of a threshold.
 */
export function solveExactly(rows: readonly (readonly Rational[])[], right: readonly Rational[]): readonly Rational[] | null {
  const work = rows.map((row, place) => [...row, right[place] ?? { n: 0n, d: 1n }]);
  const size = work.length;
  for (let column = 0; column < size; column += 1) {
    const found = work.findIndex((row, place) => place >= column && row[column]?.n !== 0n);
    const pivotRow = work[found];
    const displaced = work[column];
    if (pivotRow === undefined || displaced === undefined) return null;
    work[found] = displaced;
    work[column] = pivotRow;
    const pivot = pivotRow[column];
    if (pivot === undefined) return null;
    work.forEach((row, place) => {
      const head = row[column];
      if (place === column || head === undefined || head.n === 0n) return;
      const times = divide(head, pivot);
      work[place] = row.map((entry, at) => reduced(subtract(entry, multiply(times, pivotRow[at] ?? { n: 0n, d: 1n }))));
    });
  }
  return work.map((row, place) => reduced(divide(row[size] ?? { n: 0n, d: 1n }, row[place] ?? { n: 1n, d: 1n })));
}

/** The unknowns that make Σ (row · unknowns − observed)² least, by the normal equations. Null when they are not determined. */
export function leastSquares(rows: readonly (readonly Rational[])[], observed: readonly Rational[]): readonly Rational[] | null {
  const unknowns = rows[0]?.length ?? 0;
  const zero = { n: 0n, d: 1n };
  const columns = Array.from({ length: unknowns }, (_, column) => rows.map((row) => row[column] ?? zero));
  const dot = (a: readonly Rational[], b: readonly Rational[]) =>
    sumOf(a.map((entry, place) => multiply(entry, b[place] ?? zero)));
  return solveExactly(
    columns.map((column) => columns.map((other) => dot(column, other))),
    columns.map((column) => dot(column, observed)),
  );
}
