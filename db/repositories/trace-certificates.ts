import type { Trace } from '../../services/contracts/trace';
import { isoOf, select, type Reading } from '../work';

type Certificate = Trace['certificates'][number];

/** Certificates that cover a part, oldest first, with what was withdrawn of it, every download and every acknowledgement. */
export async function tracedCertificates(reading: Reading, partId: string): Promise<(Certificate & { id: string })[]> {
  const rows = await select<Omit<Certificate, 'withdrawals' | 'receipts'> & { id: string }>(
    reading,
    `SELECT c.id, c.number, c.state, s.number AS shipment, r.sentence, a.name AS signedBy, ${isoOf('c.signed_at')} AS signedAt, ${isoOf('c.issued_at')} AS issuedAt
     FROM release_parts rp JOIN releases r ON r.id = rp.release_id JOIN certificates c ON c.release_id = r.id JOIN shipments s ON s.id = r.shipment_id JOIN accounts a ON a.id = r.signed_by
     WHERE rp.part_id = ? ORDER BY c.signed_at, c.id`,
    [partId],
  );
  const ids = rows.map(({ id }) => id);
  if (ids.length === 0) return [];
  const withdrawals = await select<Omit<Certificate['withdrawals'][number], 'whole'> & { certificateId: string; whole: number }>(
    reading,
    `SELECT w.certificate_id AS certificateId, w.part_id IS NULL AS whole, w.reason, a.name AS withdrawnBy, ${isoOf('w.withdrawn_at')} AS withdrawnAt
     FROM certificate_withdrawals w JOIN accounts a ON a.id = w.withdrawn_by WHERE w.certificate_id IN (?) AND (w.part_id IS NULL OR w.part_id = ?) ORDER BY w.withdrawn_at`,
    [ids, partId],
  );
  const receipts = await select<Certificate['receipts'][number] & { certificateId: string }>(
    reading,
    `SELECT t.certificate_id AS certificateId, t.kind, t.note, a.name AS \`by\`, ${isoOf('t.at')} AS at
     FROM certificate_receipts t JOIN accounts a ON a.id = t.by_account WHERE t.certificate_id IN (?) ORDER BY t.at`,
    [ids],
  );
  return rows.map((row) => ({
    ...row,
    withdrawals: withdrawals
      .filter(({ certificateId }) => certificateId === row.id)
      .map(({ certificateId: _, whole, ...rest }) => ({ ...rest, whole: whole === 1 })),
    receipts: receipts.filter(({ certificateId }) => certificateId === row.id).map(({ certificateId: _, ...rest }) => rest),
  }));
}
