import { z } from 'zod';
import { id, instant, page, pageQuery, password, words } from './common';
import { operation } from './operation';

export const certificateState = z.enum(['signed', 'issued', 'partly-withdrawn', 'withdrawn', 'superseded']);

export const certificateSummary = z.object({
  number: z.string(),
  state: certificateState,
  customer: z.string(),
  purchaseOrder: z.string(),
  partNumber: z.string(),
  quantity: z.int(),
  signedBy: z.string(),
  signedAt: instant,
  issuedAt: instant.nullable(),
  acknowledged: z.boolean(),
});
export type CertificateSummary = z.output<typeof certificateSummary>;

export const certificate = certificateSummary.extend({
  id,
  checkCode: z.string(),
  sha256: z.string().nullable(),
  bytes: z.int().nullable(),
  revision: z.string(),
  shipment: z.string().nullable(),
  serials: z.array(z.object({ serial: z.string(), heat: z.string(), part: id.nullable(), withdrawn: z.boolean() })),
  receipts: z.array(z.object({ kind: z.string(), by: z.string(), at: instant, note: z.string().nullable() })),
  withdrawals: z.array(z.object({ serial: z.string().nullable(), reason: z.string(), by: z.string(), at: instant })),
  /** While signed and not issued: the last thing that stood in the way, if anything did. */
  waitsFor: z.string().nullable(),
});
export type Certificate = z.output<typeof certificate>;

const byNumber = z.object({ number: z.string().max(24) });

export const listCertificates = operation({
  name: 'list-certificates',
  method: 'GET',
  path: '/api/certificates',
  summary: 'Certificates, newest first; a customer sees their own.',
  changes: false,
  query: pageQuery.extend({ serial: z.string().max(40).optional() }),
  response: page(certificateSummary),
  status: 200,
});

export const readCertificate = operation({
  name: 'read-certificate',
  method: 'GET',
  path: '/api/certificates/{number}',
  summary: 'One certificate.',
  changes: false,
  params: byNumber,
  response: certificate,
  status: 200,
});

export const downloadCertificate = operation({
  name: 'download-certificate',
  method: 'GET',
  path: '/api/certificates/{number}/pdf',
  summary: 'The sealed PDF; a customer’s download is kept.',
  changes: false,
  params: byNumber,
  status: 200,
});

export const acknowledgeCertificate = operation({
  name: 'acknowledge-certificate',
  method: 'POST',
  path: '/api/certificates/{number}/acknowledgement',
  summary: 'The customer says what arrived.',
  changes: true,
  params: byNumber,
  body: z.strictObject({ received: z.enum(['complete', 'with-difference']).default('complete'), note: words(600).optional() }),
  response: certificate,
  status: 201,
});

export const withdrawCertificate = operation({
  name: 'withdraw-certificate',
  method: 'POST',
  path: '/api/certificates/{number}/withdrawal',
  summary: 'Withdraw it whole, or for some serials.',
  changes: true,
  params: byNumber,
  body: z.strictObject({ serials: z.array(z.string().max(40)).min(1).max(500).optional(), reason: words(600, 5), password }),
  response: certificate,
  status: 201,
});

export const verifyState = z.enum(['valid', 'valid-except', 'superseded', 'withdrawn', 'altered', 'unknown']);

/** What a stranger with the paper learns: no more than the paper says. */
export const verifyAnswer = z.object({
  state: verifyState,
  number: z.string().nullable(),
  issuedAt: instant.nullable(),
  partNumber: z.string().nullable(),
  quantity: z.int().nullable(),
  withdrawnSerials: z.array(z.string()),
  replacedBy: z.string().nullable(),
});
export type VerifyAnswer = z.output<typeof verifyAnswer>;

export const verifyCertificate = operation({
  name: 'verify-certificate',
  method: 'GET',
  path: '/api/verify/{number}',
  summary: 'Public: a certificate by its number and check code.',
  changes: false,
  params: byNumber,
  query: z.object({ check: z.string().max(60).default('') }),
  response: verifyAnswer,
  status: 200,
});

export const verifyFile = operation({
  name: 'verify-file',
  method: 'POST',
  path: '/api/verify',
  summary: 'Public: a certificate file, or `{sha256}` of one as JSON.',
  changes: false,
  bodyKind: 'stream',
  response: verifyAnswer,
  status: 200,
});
