import { randomBytes } from 'node:crypto';
import { thePlant } from '@/db/repositories/plants';
import type { ShipmentRow } from '@/db/repositories/shipments';
import { selectOne, type Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import { orderClauses } from '@/services/contracts/order-clauses';
import { environment } from '@/services/environment';
import { certificateSentences } from '@/services/pdf/certificate-words';
import { certificateRecord, type CertificateRecord, type CertificateSerial } from '@/services/pdf/certificate-record';
import type { GatedPart } from './gates';

const alphabet = 'ABCDEFGHJKLMNPQRSTUVWXYZ23456789';

/** A check code of 26 characters (130 bits), so that numbers cannot be walked. */
export function newCheckCode(): string {
  const letters = [...randomBytes(26)].map((byte) => alphabet[byte % alphabet.length] ?? 'A').join('');
  return [letters.slice(0, 8), letters.slice(8, 14), letters.slice(14, 20), letters.slice(20)].join('-');
}

const results = {
  met: 'accept',
  'met-by-sample': 'met-by-sample',
  'met-by-ancestor': 'met-by-ancestor',
  'met-by-outside-certificate': 'met-by-outside-certificate',
  waived: 'waived',
} as const;

function serialOf({ part, requirements, inspections, heat }: GatedPart): CertificateSerial {
  return {
    serial: part.serial,
    heat: heat ?? 'none',
    cluster: part.cluster,
    position: part.position,
    inspections: requirements.map((row) => {
      const signed = inspections.find(({ id }) => id === row.inspectionId);
      return {
        operation: row.operation,
        title: row.title,
        method: row.method,
        standard: signed?.standard ?? null,
        technique: row.technique,
        inspectionNumber: signed?.number ?? null,
        result: results[row.state as keyof typeof results],
        signedAt: signed?.signedAt ?? null,
      };
    }),
    concessions: [],
  };
}

const lines = (address: string): string[] =>
  address
    .split('\n')
    .map((line) => line.trim())
    .filter((line) => line !== '');

/** What the release says, complete, at the moment of signing: the certificate prints it and carries it. */
export async function buildReleaseRecord(
  work: Work & { readonly actor: Actor },
  shipment: ShipmentRow,
  gated: readonly GatedPart[],
  number: string,
  checkCode: string,
): Promise<CertificateRecord> {
  const plant = await thePlant(work);
  const customer = await selectOne<{ address: string; locale: 'en' | 'fr' }>(
    work,
    'SELECT address, locale FROM customers WHERE id = ?',
    [shipment.customerId],
  );
  const locale = customer?.locale ?? 'en';
  return certificateRecord.parse({
    kind: 'certificate-of-conformance',
    schemaVersion: 1,
    number,
    checkCode,
    replaces: null,
    issuedAt: work.now,
    timeZone: plant.zone,
    locale,
    plant: { name: plant.name, address: lines(plant.address) },
    customer: { name: shipment.customerName, address: lines(customer?.address ?? '') },
    order: { number: shipment.orderNumber, purchaseOrder: shipment.purchaseOrder, line: String(shipment.line) },
    part: { number: shipment.partNumber, title: shipment.title },
    drawing: { number: shipment.partNumber, revision: shipment.revision },
    planIssue: [...new Set(gated.map(({ part }) => String(part.planIssue)))].join(', '),
    quantity: gated.length,
    serials: gated.map(serialOf),
    type31: true,
    ...certificateSentences(locale),
    signatory: {
      name: work.actor.name,
      function: locale === 'fr' ? 'Responsable de la libération' : 'Release signatory',
      signedAt: work.now,
    },
    place: lines(plant.address)[1] ?? plant.name,
    verifyUrl: `${environment().RINGTRUE_BASE_URL}/verify?number=${number}&check=${checkCode}`,
    timeStamp: 'none',
    clauses: orderClauses.parse(JSON.parse(shipment.clauses)).statements,
  });
}
