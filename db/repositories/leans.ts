import { execute, sqlTimeOf, type Work } from '../work';

/** One thing that an act leaned on, and when; `day` is the plant's calendar day. */
export interface Lean {
  readonly kind: 'equipment' | 'scope' | 'technique';
  readonly target: string;
  readonly at: string;
  readonly day: string;
}

/** Keeps what the acts of a signed inspection leaned on; the same thing at the same instant counts once. */
export async function keepLeans(work: Work, inspectionId: string, leans: readonly Lean[]): Promise<void> {
  if (leans.length === 0) return;
  await execute(
    work,
    `INSERT IGNORE INTO inspection_leans (inspection_id, kind, target, at, day) VALUES ${leans.map(() => '(?, ?, ?, ?, ?)').join(', ')}`,
    leans.flatMap(({ kind, target, at, day }) => [inspectionId, kind, target, sqlTimeOf(at), day]),
  );
}
