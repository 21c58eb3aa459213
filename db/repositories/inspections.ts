import type { EvaluationAnswer } from '../../services/contracts/evaluate';
import { table } from '../models/table';
import { isoOf, select, selectOne, type Reading } from '../work';

type Verdict = EvaluationAnswer['verdict'];

export interface InspectionRow {
  id: string;
  number: string;
  partId: string;
  requirementId: string;
  cycle: number;
  planIssueId: string;
  method: string;
  technique: string | null;
  verdict: Verdict;
  readingCount: number;
  indicationCount: number;
  engine: string;
  criteriaDigest: string;
  inputDigest: string;
  record: Buffer;
  recordDigest: string;
  sentence: string;
  lateEntry: boolean;
  repeatReason: string | null;
  supersedes: string | null;
  signedBy: string;
  actedAt: string;
  enteredAt: string;
  signedAt: string;
}

export const inspections = table<InspectionRow>('inspections', {
  id: 'uuid',
  number: 'text',
  partId: 'uuid',
  requirementId: 'uuid',
  cycle: 'int',
  planIssueId: 'uuid',
  method: 'text',
  technique: 'text',
  verdict: 'text',
  readingCount: 'int',
  indicationCount: 'int',
  engine: 'text',
  criteriaDigest: 'text',
  inputDigest: 'text',
  record: 'bytes',
  recordDigest: 'text',
  sentence: 'text',
  lateEntry: 'flag',
  repeatReason: 'text',
  supersedes: 'uuid',
  signedBy: 'uuid',
  actedAt: 'time',
  enteredAt: 'time',
  signedAt: 'time',
});

interface ReadingRow {
  inspectionId: string;
  seq: number;
  characteristic: string;
  /** Decimal text, in `unit`; never a JSON number. */
  value: string;
  decimals: number;
  unit: string;
  verdict: Verdict;
}

export const inspectionReadings = table<ReadingRow>(
  'inspection_readings',
  { inspectionId: 'uuid', seq: 'int', characteristic: 'text', value: 'decimal', decimals: 'int', unit: 'text', verdict: 'text' },
  ['inspectionId', 'seq'],
);

interface IndicationRow {
  inspectionId: string;
  seq: number;
  label: string;
  type: string;
  view: string | null;
  lengthMm: string | null;
  widthMm: string | null;
  class: string | null;
  zones: string;
  relevant: boolean;
  shape: unknown;
  verdict: Verdict | 'not-judged';
}

export const inspectionIndications = table<IndicationRow>(
  'inspection_indications',
  {
    inspectionId: 'uuid',
    seq: 'int',
    label: 'text',
    type: 'text',
    view: 'text',
    lengthMm: 'decimal',
    widthMm: 'decimal',
    class: 'text',
    zones: 'text',
    relevant: 'flag',
    shape: 'json',
    verdict: 'text',
  },
  ['inspectionId', 'seq'],
);

export const inspectionEquipment = table<{ inspectionId: string; equipmentId: string }>(
  'inspection_equipment',
  { inspectionId: 'uuid', equipmentId: 'uuid' },
  ['inspectionId', 'equipmentId'],
);

interface InspectionEnd {
  readonly kind: 'superseded' | 'voided';
  readonly reason: string;
  readonly at: string;
  readonly successor: string | null;
}

/** A signed inspection as read; `record` is the canonical bytes that were signed. */
export type SignedInspection = Omit<InspectionRow, 'lateEntry'> & {
  readonly lateEntry: boolean;
  readonly signerName: string;
  readonly ended: InspectionEnd | null;
};

type Stored = Omit<SignedInspection, 'lateEntry' | 'ended'> & {
  lateEntry: number;
  endKind: 'superseded' | 'voided' | null;
  endReason: string | null;
  endAt: string | null;
  successor: string | null;
};

const query = `SELECT i.id, i.number, i.part_id AS partId, i.requirement_id AS requirementId, i.cycle, i.plan_issue_id AS planIssueId, i.method, i.technique, i.verdict,
  i.reading_count AS readingCount, i.indication_count AS indicationCount, i.engine, i.criteria_digest AS criteriaDigest, i.input_digest AS inputDigest, i.record,
  i.record_digest AS recordDigest, i.sentence, i.late_entry AS lateEntry, i.repeat_reason AS repeatReason, i.supersedes, i.signed_by AS signedBy, a.name AS signerName,
  ${isoOf('i.acted_at')} AS actedAt, ${isoOf('i.entered_at')} AS enteredAt, ${isoOf('i.signed_at')} AS signedAt,
  e.kind AS endKind, e.reason AS endReason, ${isoOf('e.ended_at')} AS endAt, e.successor_id AS successor
  FROM inspections i JOIN accounts a ON a.id = i.signed_by LEFT JOIN inspection_ends e ON e.inspection_id = i.id`;

function toSigned({ endKind, endReason, endAt, successor, ...row }: Stored): SignedInspection {
  return {
    ...row,
    lateEntry: row.lateEntry === 1,
    ended: endKind === null || endAt === null ? null : { kind: endKind, reason: endReason ?? '', at: endAt, successor },
  };
}

export async function signedInspectionById(reading: Reading, inspectionId: string): Promise<SignedInspection | undefined> {
  const row = await selectOne<Stored>(reading, `${query} WHERE i.id = ?`, [inspectionId]);
  return row && toSigned(row);
}

/** Readings of a signed inspection as they were entered: `0.10` comes back as `0.10`. */
export async function readingsOfInspection(
  reading: Reading,
  inspectionId: string,
): Promise<Pick<ReadingRow, 'characteristic' | 'value' | 'unit' | 'verdict'>[]> {
  const rows = await select<ReadingRow>(
    reading,
    'SELECT characteristic, value, decimals, unit, verdict FROM inspection_readings WHERE inspection_id = ? ORDER BY seq',
    [inspectionId],
  );
  return rows.map(({ characteristic, value, decimals, unit, verdict }) => ({
    characteristic,
    value: withDecimals(value, decimals),
    unit,
    verdict,
  }));
}

/** The column keeps ten digits after the point; only the recorded ones are shown. */
function withDecimals(value: string, decimals: number): string {
  const [whole = '0', fraction = ''] = value.split('.');
  return decimals === 0 ? whole : `${whole}.${fraction.padEnd(decimals, '0').slice(0, decimals)}`;
}
