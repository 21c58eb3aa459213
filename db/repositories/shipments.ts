import type { ShipmentSummary } from '../../services/contracts/shipments';
import { isoOf, select, selectOne, sqlTimeOf, type Reading } from '../work';

export interface ShipmentRow {
  id: string;
  number: string;
  state: ShipmentSummary['state'];
  lineId: string;
  line: number;
  quantity: number;
  released: number;
  dueOn: string | null;
  clauses: string;
  orderNumber: string;
  purchaseOrder: string;
  customerId: string;
  customerName: string;
  revisionId: string;
  revision: string;
  drawingId: string;
  partNumber: string;
  title: string;
  partCount: number;
  certificateNumber: string | null;
  certificateState: string | null;
  createdAt: string;
}

const query = `SELECT s.id, s.number, s.state, ol.id AS lineId, ol.line, ol.quantity, ol.released, DATE_FORMAT(ol.due_on, '%Y-%m-%d') AS dueOn, ol.clauses, o.number AS orderNumber,
  o.purchase_order AS purchaseOrder, c.id AS customerId, c.name AS customerName, r.id AS revisionId, r.revision, d.id AS drawingId, d.number AS partNumber, d.title,
  (SELECT COUNT(*) FROM shipment_parts sp WHERE sp.shipment_id = s.id) AS partCount, k.number AS certificateNumber, k.state AS certificateState, ${isoOf('s.created_at')} AS createdAt
  FROM shipments s JOIN order_lines ol ON ol.id = s.order_line_id JOIN orders o ON o.id = ol.order_id JOIN customers c ON c.id = o.customer_id
  JOIN drawing_revisions r ON r.id = ol.drawing_revision_id JOIN drawings d ON d.id = r.drawing_id
  LEFT JOIN releases rl ON rl.shipment_id = s.id LEFT JOIN certificates k ON k.release_id = rl.id`;

export function shipmentByNumber(reading: Reading, number: string): Promise<ShipmentRow | undefined> {
  return selectOne<ShipmentRow>(reading, `${query} WHERE s.number = ?`, [number]);
}

/** Shipments newest first before a key. */
export function listShipments(reading: Reading, limit: number, before: readonly [string, string] | null): Promise<ShipmentRow[]> {
  const where = before ? 'WHERE s.created_at <= ? AND (s.created_at < ? OR s.id < ?)' : '';
  const values = before ? [sqlTimeOf(before[0]), sqlTimeOf(before[0]), before[1]] : [];
  return select<ShipmentRow>(reading, `${query} ${where} ORDER BY s.created_at DESC, s.id DESC LIMIT ?`, [...values, limit]);
}

/** Ids of a shipment's parts, in id order. */
export async function partIdsOfShipment(reading: Reading, shipmentId: string): Promise<string[]> {
  const rows = await select<{ id: string }>(
    reading,
    'SELECT part_id AS id FROM shipment_parts WHERE shipment_id = ? ORDER BY part_id',
    [shipmentId],
  );
  return rows.map(({ id }) => id);
}

export interface SignedInspection {
  readonly id: string;
  readonly partId: string;
  readonly requirementId: string;
  readonly number: string;
  readonly verdict: string;
  readonly method: string;
  readonly technique: string | null;
  readonly standard: string | null;
  readonly signedBy: string;
  readonly signedAt: string;
}

/** Every signed inspection of these parts, one query. */
export function inspectionsOfParts(reading: Reading, partIds: readonly string[]): Promise<SignedInspection[]> {
  if (partIds.length === 0) return Promise.resolve([]);
  return select(
    reading,
    `SELECT i.id, i.part_id AS partId, i.requirement_id AS requirementId, i.number, i.verdict, i.method, i.technique, i.signed_by AS signedBy, ${isoOf('i.signed_at')} AS signedAt,
       (SELECT t.standard FROM technique_issues t WHERE t.number = i.technique ORDER BY t.issue DESC LIMIT 1) AS standard
     FROM inspections i WHERE i.part_id IN (?)`,
    [partIds],
  );
}

/** Who decided findings of these parts. */
export function decidersOfParts(reading: Reading, partIds: readonly string[]): Promise<{ partId: string; decidedBy: string }[]> {
  if (partIds.length === 0) return Promise.resolve([]);
  return select(
    reading,
    'SELECT f.part_id AS partId, s.decided_by AS decidedBy FROM dispositions s JOIN findings f ON f.id = s.finding_id WHERE f.part_id IN (?)',
    [partIds],
  );
}

/**
 * Equipment found out of tolerance over acts that these parts rest on: since the calibration before, and not found
 * without effect by a level 3.
 */
export function suspectEquipment(
  reading: Reading,
  partIds: readonly string[],
): Promise<{ partId: string; equipment: string; inspection: string }[]> {
  if (partIds.length === 0) return Promise.resolve([]);
  return select(
    reading,
    `SELECT DISTINCT i.part_id AS partId, e.number AS equipment, i.number AS inspection FROM part_requirements r JOIN inspections i ON i.id = r.inspection_id
       JOIN inspection_leans l ON l.inspection_id = i.id AND l.kind = 'equipment' JOIN equipment e ON e.id = l.target
       JOIN calibrations k ON k.equipment_id = e.id AND k.as_found = 'failed' AND l.at <= k.created_at AND (k.as_left = 'failed' OR l.day <= k.calibrated_on)
     WHERE r.part_id IN (?) AND NOT EXISTS (SELECT 1 FROM calibrations g WHERE g.equipment_id = k.equipment_id AND g.created_at < k.created_at AND g.calibrated_on > l.day
         AND (g.function = 'all' OR (g.function = k.function AND g.range_lower <=> k.range_lower AND g.range_upper <=> k.range_upper AND g.range_unit <=> k.range_unit)))
       AND NOT EXISTS (SELECT 1 FROM suspect_lists s JOIN suspect_groups z ON z.list_id = s.id AND z.closed_how = 'no-effect' JOIN suspect_inspections y ON y.group_id = z.id
         WHERE s.cause_id = k.id AND y.inspection_id = i.id)`,
    [partIds],
  );
}

/** Files of the accepted inspections that the last look at the store found missing or altered. */
export function badEvidence(reading: Reading, partIds: readonly string[]): Promise<{ partId: string; name: string }[]> {
  if (partIds.length === 0) return Promise.resolve([]);
  return select(
    reading,
    `SELECT r.part_id AS partId, v.name FROM part_requirements r JOIN inspection_evidence l ON l.inspection_id = r.inspection_id JOIN evidence v ON v.id = l.evidence_id
     WHERE r.part_id IN (?) AND (SELECT c.outcome FROM evidence_checks c WHERE c.evidence_id = v.id ORDER BY c.at DESC LIMIT 1) IN ('missing', 'altered')`,
    [partIds],
  );
}
