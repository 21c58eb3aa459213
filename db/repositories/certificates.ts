import type { Certificate, CertificateSummary } from '../../services/contracts/certificates';
import { isoOf, select, selectOne, sqlTimeOf, type Reading } from '../work';

export interface CertificateRow {
  id: string;
  number: string;
  releaseId: string;
  customerId: string;
  customer: string;
  state: CertificateSummary['state'];
  checkCode: string;
  sha256: string | null;
  bytes: number | null;
  storageKey: string | null;
  signedAt: string;
  signedBy: string;
  issuedAt: string | null;
  purchaseOrder: string;
  partNumber: string;
  revision: string;
  shipment: string;
  quantity: number;
  acknowledged: number;
  replacedBy: string | null;
}

const query = `SELECT c.id, c.number, c.release_id AS releaseId, c.customer_id AS customerId, k.name AS customer, c.state, c.check_code AS checkCode, c.sha256, c.bytes, c.storage_key AS storageKey,
  ${isoOf('c.signed_at')} AS signedAt, a.name AS signedBy, ${isoOf('c.issued_at')} AS issuedAt, o.purchase_order AS purchaseOrder, d.number AS partNumber, r.revision, s.number AS shipment,
  (SELECT COUNT(*) FROM release_parts rp WHERE rp.release_id = c.release_id) AS quantity,
  EXISTS (SELECT 1 FROM certificate_receipts cr WHERE cr.certificate_id = c.id AND cr.kind <> 'downloaded') AS acknowledged,
  (SELECT n.number FROM certificates n WHERE n.id = c.superseded_by) AS replacedBy
  FROM certificates c JOIN customers k ON k.id = c.customer_id JOIN releases rl ON rl.id = c.release_id JOIN accounts a ON a.id = rl.signed_by JOIN shipments s ON s.id = rl.shipment_id
  JOIN order_lines ol ON ol.id = s.order_line_id JOIN orders o ON o.id = ol.order_id JOIN drawing_revisions r ON r.id = ol.drawing_revision_id JOIN drawings d ON d.id = r.drawing_id`;

/** A certificate by number; for a customer only their own. */
export function certificateByNumber(
  reading: Reading,
  number: string,
  customerId: string | null,
): Promise<CertificateRow | undefined> {
  return customerId === null
    ? selectOne<CertificateRow>(reading, `${query} WHERE c.number = ?`, [number])
    : selectOne<CertificateRow>(reading, `${query} WHERE c.number = ? AND c.customer_id = ?`, [number, customerId]);
}

export function certificateByDigest(reading: Reading, sha256: string): Promise<CertificateRow | undefined> {
  return selectOne<CertificateRow>(reading, `${query} WHERE c.sha256 = ?`, [sha256]);
}

export function certificateByRelease(reading: Reading, releaseId: string): Promise<CertificateRow | undefined> {
  return selectOne<CertificateRow>(reading, `${query} WHERE c.release_id = ?`, [releaseId]);
}

export function certificateById(reading: Reading, certificateId: string): Promise<CertificateRow | undefined> {
  return selectOne<CertificateRow>(reading, `${query} WHERE c.id = ?`, [certificateId]);
}

/** Certificates newest first before a key; of one customer, and with a serial, where asked. */
export function listCertificates(
  reading: Reading,
  filter: { readonly customerId: string | null; readonly serial: string | undefined },
  limit: number,
  before: readonly [string, string] | null,
): Promise<CertificateRow[]> {
  const where = ['1 = 1'];
  const values: unknown[] = [];
  if (filter.customerId !== null) {
    where.push('c.customer_id = ?');
    values.push(filter.customerId);
  }
  if (filter.serial) {
    where.push(
      'EXISTS (SELECT 1 FROM release_parts x JOIN parts p ON p.id = x.part_id WHERE x.release_id = c.release_id AND p.serial = ?)',
    );
    values.push(filter.serial);
  }
  if (before) {
    where.push('c.signed_at <= ? AND (c.signed_at < ? OR c.id < ?)');
    values.push(sqlTimeOf(before[0]), sqlTimeOf(before[0]), before[1]);
  }
  return select<CertificateRow>(reading, `${query} WHERE ${where.join(' AND ')} ORDER BY c.signed_at DESC, c.id DESC LIMIT ?`, [
    ...values,
    limit,
  ]);
}

/** The release's record as it was signed. */
export function releaseRecord(reading: Reading, releaseId: string): Promise<{ record: Buffer } | undefined> {
  return selectOne<{ record: Buffer }>(reading, 'SELECT record FROM releases WHERE id = ?', [releaseId]);
}

export function receiptsOf(reading: Reading, certificateId: string): Promise<Certificate['receipts']> {
  return select(
    reading,
    `SELECT r.kind, a.name AS \`by\`, ${isoOf('r.at')} AS at, r.note FROM certificate_receipts r JOIN accounts a ON a.id = r.by_account WHERE r.certificate_id = ? ORDER BY r.at`,
    [certificateId],
  );
}

export function withdrawalsOf(reading: Reading, certificateId: string): Promise<Certificate['withdrawals']> {
  return select(
    reading,
    `SELECT p.serial, w.reason, a.name AS \`by\`, ${isoOf('w.withdrawn_at')} AS at FROM certificate_withdrawals w LEFT JOIN parts p ON p.id = w.part_id JOIN accounts a ON a.id = w.withdrawn_by
     WHERE w.certificate_id = ? ORDER BY w.withdrawn_at`,
    [certificateId],
  );
}

export function partsOfRelease(reading: Reading, releaseId: string): Promise<{ id: string; serial: string }[]> {
  return select(
    reading,
    'SELECT p.id, p.serial FROM release_parts rp JOIN parts p ON p.id = rp.part_id WHERE rp.release_id = ? ORDER BY p.serial',
    [releaseId],
  );
}

export async function lastIssueError(reading: Reading, releaseId: string): Promise<string | null> {
  const row = await selectOne<{ error: string | null }>(reading, 'SELECT last_error AS error FROM jobs WHERE unique_key = ?', [
    `issue-${releaseId}`,
  ]);
  return row?.error ?? null;
}
