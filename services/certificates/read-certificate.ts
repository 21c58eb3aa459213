import {
  certificateByNumber,
  lastIssueError,
  listCertificates as rowsOf,
  partsOfRelease,
  receiptsOf,
  releaseRecord,
  withdrawalsOf,
  type CertificateRow,
} from '@/db/repositories/certificates';
import type { Reading } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { Certificate, CertificateSummary, listCertificates as contract } from '@/services/contracts/certificates';
import type { AnswerOf, QueryOf } from '@/services/contracts/operation';
import { pageOf, partsOfKey } from '@/services/http/keyset';
import { notFound } from '@/services/http/problem';
import { certificateRecord } from '@/services/pdf/certificate-record';

/** The customer whose certificates this person may see: their own, or null for all. */
export function customerScope(actor: Actor): string | null {
  return actor.role === 'customer-quality' ? (actor.customerId ?? '00000000-0000-0000-0000-000000000000') : null;
}

function summaryOf(row: CertificateRow): CertificateSummary {
  const { number, state, customer, purchaseOrder, partNumber, quantity, signedBy, signedAt, issuedAt } = row;
  return {
    number,
    state,
    customer,
    purchaseOrder,
    partNumber,
    quantity,
    signedBy,
    signedAt,
    issuedAt,
    acknowledged: row.acknowledged === 1,
  };
}

/** Certificates this person may see, newest first. */
export async function listCertificates(
  reading: Reading & { readonly actor: Actor },
  query: QueryOf<typeof contract>,
): Promise<AnswerOf<typeof contract>> {
  const before = partsOfKey(query.after, 2);
  const rows = await rowsOf(
    reading,
    { customerId: customerScope(reading.actor), serial: query.serial },
    query.limit + 1,
    before && [String(before[0]), String(before[1])],
  );
  return pageOf(rows, query.limit, ({ signedAt, id }) => [signedAt, id], summaryOf);
}

/** The certificate, or the same 'not found' whether it is another customer's or nobody's. */
export async function certificateFor(reading: Reading, actor: Actor, number: string): Promise<CertificateRow> {
  const row = await certificateByNumber(reading, number, customerScope(actor));
  if (!row) throw notFound(`Certificate ${number}`);
  return row;
}

/** One certificate. A customer sees no other people's names but the signatory's, and no ids of parts. */
export async function readCertificate(reading: Reading & { readonly actor: Actor }, number: string): Promise<Certificate> {
  const row = await certificateFor(reading, reading.actor, number);
  const stored = await releaseRecord(reading, row.releaseId);
  const record = stored ? certificateRecord.parse(JSON.parse(stored.record.toString('utf8'))) : null;
  const parts = new Map((await partsOfRelease(reading, row.releaseId)).map(({ id, serial }) => [serial, id]));
  const withdrawals = await withdrawalsOf(reading, row.id);
  const outside = reading.actor.role === 'customer-quality';
  const gone = (serial: string) => withdrawals.some((one) => one.serial === null || one.serial === serial);
  return {
    ...summaryOf(row),
    id: row.id,
    checkCode: row.checkCode,
    sha256: row.sha256,
    bytes: row.bytes,
    revision: row.revision,
    shipment: outside ? null : row.shipment,
    serials: (record?.serials ?? []).map(({ serial, heat }) => ({
      serial,
      heat,
      part: outside ? null : (parts.get(serial) ?? null),
      withdrawn: gone(serial),
    })),
    receipts: await receiptsOf(reading, row.id),
    withdrawals: outside ? withdrawals.map((one) => ({ ...one, by: '' })) : withdrawals,
    waitsFor: row.state === 'signed' && !outside ? await lastIssueError(reading, row.releaseId) : null,
  };
}
