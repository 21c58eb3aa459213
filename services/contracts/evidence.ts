import { z } from 'zod';
import { id, instant } from './common';
import { operation } from './operation';

const byId = z.object({ id });

export const evidenceRole = z.enum(['radiograph', 'photograph', 'reading-file', 'document']);
export type EvidenceRole = z.output<typeof evidenceRole>;

/** A stored file: content-addressed, so the same bytes are the same file. */
export const evidenceFile = z.object({
  id,
  sha256: z.string(),
  bytes: z.int(),
  mediaType: z.string(),
  name: z.string(),
  kind: z.string(),
  width: z.int().nullable(),
  height: z.int().nullable(),
  bits: z.int().nullable(),
  /** Micrometres per pixel, decimal. */
  pixelPitchUm: z.string().nullable(),
  facts: z.record(z.string(), z.unknown()),
  hasPreview: z.boolean(),
  hasPixels: z.boolean(),
  admittedAt: instant,
});
export type EvidenceFile = z.output<typeof evidenceFile>;

export const admitEvidence = operation({
  name: 'admit-evidence',
  method: 'POST',
  path: '/api/evidence',
  summary: 'The body is the file itself, streamed. 200 and the same id when these bytes are already there.',
  changes: true,
  bodyKind: 'stream',
  query: z.object({
    kind: evidenceRole,
    name: z
      .string()
      .min(1)
      .max(200)
      // A name goes into headers and onto pages: no path, no control and no direction-changing characters.
      .refine((name) => !/[\p{Cc}\p{Cf}/\\]/u.test(name), 'must not contain slashes, control or hidden characters'),
  }),
  response: evidenceFile,
  status: 201,
});

export const readEvidence = operation({
  name: 'read-evidence',
  method: 'GET',
  path: '/api/evidence/{id}',
  summary: 'The stored bytes, with ETag and Repr-Digest.',
  changes: false,
  params: byId,
  status: 200,
});

export const readEvidenceFacts = operation({
  name: 'read-evidence-facts',
  method: 'GET',
  path: '/api/evidence/{id}/facts',
  summary: 'What is known of a file.',
  changes: false,
  params: byId,
  response: evidenceFile,
  status: 200,
});

export const readEvidencePreview = operation({
  name: 'read-evidence-preview',
  method: 'GET',
  path: '/api/evidence/{id}/preview',
  summary: 'A preview picture.',
  changes: false,
  params: byId,
  status: 200,
});

export const readEvidencePixels = operation({
  name: 'read-evidence-pixels',
  method: 'GET',
  path: '/api/evidence/{id}/pixels',
  summary: '16-bit pixels packed for the viewer.',
  changes: false,
  params: byId,
  status: 200,
});
