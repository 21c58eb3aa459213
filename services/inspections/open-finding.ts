import { newId, nextNumber } from '@/db/identity';
import { table, insert } from '@/db/models/table';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { EvaluationAnswer } from '@/services/contracts/evaluate';
import type { InspectionCase } from './load-case';

interface FindingRow {
  id: string;
  number: string;
  partId: string;
  requirementId: string;
  inspectionId: string | null;
  customerId: string;
  state: 'open' | 'dispositioned' | 'awaiting-follow-up' | 'closed';
  verdict: string;
  summary: string;
  openedBy: string;
  openedAt: string;
  closedAt: string | null;
  version: number;
}

const findings = table<FindingRow>('findings', {
  id: 'uuid',
  number: 'text',
  partId: 'uuid',
  requirementId: 'uuid',
  inspectionId: 'uuid',
  customerId: 'uuid',
  state: 'text',
  verdict: 'text',
  summary: 'text',
  openedBy: 'uuid',
  openedAt: 'time',
  closedAt: 'time',
  version: 'int',
});

/** What stands out in an evaluation, worst rows first, as one line. */
export function findingSummary(operation: string, title: string, evaluation: EvaluationAnswer): string {
  const rows = [...evaluation.readings, ...evaluation.attributes, ...evaluation.rules];
  const worst = rows.filter(({ verdict }) => verdict === 'reject');
  const shown = worst.length > 0 ? worst : rows.filter(({ verdict }) => verdict === 'indeterminate');
  const sentences = shown.map(({ sentence }) => sentence.text).filter((text) => text !== '');
  const unjudged =
    evaluation.unjudged.length > 0 && worst.length === 0
      ? [`no rule of the plan covers indication ${evaluation.unjudged.join(', ')}`]
      : [];
  return `${operation} ${title}: ${[...sentences, ...unjudged].slice(0, 4).join(' ')}`.slice(0, 600);
}

export interface OpenedFinding {
  readonly id: string;
  readonly number: string;
  readonly summary: string;
}

/** Opens the finding of an inspection that rejects or cannot decide. Call late: its number is a locked counter. */
export async function openFinding(
  work: Work & { readonly actor: Actor },
  inspection: InspectionCase,
  verdict: string,
  summary: string,
): Promise<OpenedFinding> {
  const finding = { id: newId(), number: await nextNumber(work, 'F'), summary };
  await insert(work, findings, {
    id: finding.id,
    number: finding.number,
    partId: inspection.part.id,
    requirementId: inspection.row.id,
    inspectionId: inspection.draft.id,
    customerId: inspection.part.customerId,
    state: 'open',
    verdict,
    summary,
    openedBy: work.actor.id,
    openedAt: work.now,
    closedAt: null,
    version: 1,
  });
  return finding;
}
