import { z } from 'zod';
import { canonicalJson } from '@/services/engine/record/canonical';

/** Text that prints as it reads: no control, format, bidirectional or zero-width characters; trimmed; composed (NFC). */
function printed(most: number) {
  return z
    .string()
    .min(1)
    .max(most)
    .regex(/^[^\p{Cc}\p{Cf}\p{Co}\p{Cs}\p{Zl}\p{Zp}]*$/u, 'holds a character that does not print')
    .refine((text) => text === text.normalize('NFC').trim(), 'must be composed (NFC) and without outer spaces');
}

const short = printed(80);
const line = printed(200);
const instant = z.iso.datetime({ offset: false });
const decimal = z.string().regex(/^-?\d{1,12}(\.\d{1,12})?$/, 'must be a plain decimal number');
const name = printed(120);
const party = z.strictObject({ name, address: z.array(short).max(5) });

/** How a requirement came to be met; a rejected or open one can never be written. */
const certificateResults = [
  'accept',
  'accept-by-concession',
  'met-by-sample',
  'met-by-ancestor',
  'met-by-outside-certificate',
  'waived',
] as const;

const inspection = z.strictObject({
  operation: printed(16),
  title: printed(120),
  method: z.string().regex(/^[a-z]+(-[a-z]+)*$/),
  standard: printed(120).nullable(),
  technique: short.nullable(),
  inspectionNumber: printed(40).nullable(),
  result: z.enum(certificateResults),
  signedAt: instant.nullable(),
});

const concession = z.strictObject({ number: printed(40), requirement: line, limits: line, customerReference: short.nullable() });

const measured = z.strictObject({
  operation: printed(16),
  label: short,
  value: decimal,
  unit: printed(16),
  lower: decimal.nullable(),
  upper: decimal.nullable(),
});

const serial = z.strictObject({
  serial: printed(40),
  heat: printed(40),
  cluster: printed(40).nullable(),
  position: printed(16).nullable(),
  inspections: z.array(inspection).max(80),
  concessions: z.array(concession).max(20),
  values: z.array(measured).max(400).optional(),
});

const shape = z.strictObject({
  kind: z.literal('certificate-of-conformance'),
  schemaVersion: z.literal(1),
  number: z.string().regex(/^[A-Z0-9][A-Z0-9-]{2,23}$/),
  checkCode: z.string().regex(/^[A-Z0-9]{4,40}(-[A-Z0-9]{2,12})*$/),
  replaces: printed(24).nullable(),
  issuedAt: instant,
  timeZone: z.string().max(60).refine(isTimeZone, 'is not a time zone'),
  locale: z.enum(['en', 'fr']),
  plant: party,
  customer: party,
  order: z.strictObject({ number: short, purchaseOrder: short, line: printed(20) }),
  part: z.strictObject({ number: short, title: line }),
  drawing: z.strictObject({ number: short, revision: printed(20) }),
  planIssue: printed(40),
  quantity: z.int().min(1),
  serials: z.array(serial).min(1).max(2000),
  /** True when the caller found that the results of specific inspection are in the record: EN 10204 type 3.1. */
  type31: z.boolean(),
  statement: printed(1500),
  signatory: z.strictObject({ name, function: name, signedAt: instant }),
  place: name,
  verifyUrl: z.url({ protocol: /^https?$/ }).max(300),
  /** 'rfc3161' when the seal carries a token of a time-stamping authority; 'none' is printed on the paper. */
  timeStamp: z.enum(['none', 'rfc3161']),
  caution: printed(600),
  clauses: z.array(z.strictObject({ code: printed(40), text: printed(600) })).max(60),
});

/** What a signed release says; schema version 1. Attached to the certificate as canonical JSON and printed on it. */
export const certificateRecord = shape.superRefine((record, context) => {
  const say = (path: (string | number)[], message: string) => context.addIssue({ code: 'custom', path, message });
  if (record.quantity !== record.serials.length) say(['quantity'], 'must be the number of serials listed');
  const seen = new Set<string>();
  record.serials.forEach((part, index) => {
    if (seen.has(part.serial)) say(['serials', index, 'serial'], 'is listed twice');
    seen.add(part.serial);
    const conceded = part.inspections.some((made) => made.result === 'accept-by-concession');
    if (conceded && part.concessions.length === 0) say(['serials', index, 'concessions'], 'must name the concession used');
    if (record.type31 && !part.inspections.some(isSpecificInspection)) {
      say(['serials', index, 'inspections'], 'holds no result of specific inspection, so this is no EN 10204 type 3.1');
    }
  });
});

export type CertificateRecord = z.infer<typeof certificateRecord>;
export type CertificateSerial = CertificateRecord['serials'][number];
export type CertificateInspection = CertificateSerial['inspections'][number];

/** Specific inspection in the sense of EN 10204:2004, 2.2: made on the very products delivered, with a result on record. */
function isSpecificInspection(made: CertificateInspection): boolean {
  const onThePart = made.result === 'accept' || made.result === 'accept-by-concession';
  return onThePart && made.method !== 'process' && made.inspectionNumber !== null && made.signedAt !== null;
}

function isTimeZone(name: string): boolean {
  try {
    new Intl.DateTimeFormat('en', { timeZone: name });
    return true;
  } catch {
    return false;
  }
}

/** The bytes that are attached to the certificate: UTF-8 of the record's RFC 8785 text. Throws ZodError when it is no record. */
export function certificateRecordBytes(record: CertificateRecord): Uint8Array {
  return new TextEncoder().encode(canonicalJson(certificateRecord.parse(record)));
}
