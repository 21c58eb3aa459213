import { select, type Reading } from '../work';
import { belowLot } from './lots';
import { partColumns, partJoins, toPartSummary, type PartSummary } from './parts';

export interface PartsFilter {
  readonly serial?: string | undefined;
  readonly state?: string | undefined;
  readonly partNumber?: string | undefined;
  readonly customer?: string | undefined;
  readonly cluster?: string | undefined;
  readonly held?: string | undefined;
  readonly findings?: string | undefined;
  /** Only parts downstream of this lot. */
  readonly belowLotId?: string | undefined;
  /** Only these. */
  readonly ids?: readonly string[] | undefined;
}

/** By serial, by serial backwards, or newest first. */
export type PartsOrder = 'serial' | '-serial' | 'newest';

type Stored = Parameters<typeof toPartSummary>[0];

function conditions(filter: PartsFilter): { where: string[]; values: unknown[] } {
  const where: string[] = [];
  const values: unknown[] = [];
  const equal = (column: string, value: string | undefined) => {
    if (value === undefined || value === '') return;
    where.push(`${column} = ?`);
    values.push(value);
  };
  if (filter.serial) {
    where.push('p.serial LIKE ?');
    values.push(`${filter.serial.replace(/[\\%_]/g, '\\$&')}%`);
  }
  equal('p.state', filter.state);
  equal('d.number', filter.partNumber);
  equal('l.number', filter.cluster);
  equal('c.code', filter.customer);
  if (filter.held !== undefined) {
    where.push('p.held = ?');
    values.push(filter.held === 'true' ? 1 : 0);
  }
  if (filter.findings === 'open') where.push('p.open_findings > 0');
  if (filter.ids) {
    where.push('p.id IN (?)');
    values.push(filter.ids);
  }
  if (filter.belowLotId) where.push('p.cluster_id IN (SELECT id FROM below)');
  return { where, values };
}

const orders: Record<PartsOrder, string> = {
  serial: 'p.serial, p.id',
  '-serial': 'p.serial DESC, p.id DESC',
  newest: 'p.id DESC',
};

/** Parts after a key in the chosen order. */
export async function listParts(
  reading: Reading,
  filter: PartsFilter,
  sort: PartsOrder,
  limit: number,
  after: readonly [string, string] | null,
): Promise<PartSummary[]> {
  const { where, values } = conditions(filter);
  if (after && sort === 'serial') {
    where.push('p.serial >= ? AND (p.serial > ? OR p.id > ?)');
    values.push(after[0], after[0], after[1]);
  }
  if (after && sort === '-serial') {
    where.push('p.serial <= ? AND (p.serial < ? OR p.id < ?)');
    values.push(after[0], after[0], after[1]);
  }
  if (after && sort === 'newest') {
    // UUIDv7 ids rise with time, so the id alone is the key.
    where.push('p.id < ?');
    values.push(after[1]);
  }
  const rows = await select<Stored>(
    reading,
    `${filter.belowLotId ? belowLot : ''} SELECT ${partColumns} ${partJoins} ${where.length > 0 ? `WHERE ${where.join(' AND ')}` : ''} ORDER BY ${orders[sort]} LIMIT ?`,
    [...(filter.belowLotId ? [filter.belowLotId] : []), ...values, limit],
  );
  return rows.map(toPartSummary);
}
