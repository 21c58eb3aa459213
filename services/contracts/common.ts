import { z } from 'zod';

/** UUIDv7 made by the server. */
export const id = z.uuid();

/** Instant in UTC with microseconds, `2026-03-09T14:05:06.123456Z`. */
export const instant = z.string();

/** Calendar day of the plant, `2026-03-09`. */
export const day = z.iso.date();

// Control, zero-width and direction-override characters can make a text read as another one.
const hiding = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f\u200b-\u200f\u202a-\u202e\u2060-\u2069\ufeff]/u;

/** A line or note typed by a person: trimmed, at most `most` characters, no hidden characters. */
export function words(most: number, least = 1) {
  return z
    .string()
    .trim()
    .min(least, least === 1 ? 'must not be empty' : `must have at least ${String(least)} characters`)
    .max(most, `must have at most ${String(most)} characters`)
    .refine((text) => !hiding.test(text), 'must not contain hidden or direction-changing characters');
}

/** A number or mark printed on a document: letters, digits, dot, dash, slash, underscore. */
export const mark = z
  .string()
  .trim()
  .regex(/^[A-Za-z0-9][A-Za-z0-9./_-]{0,39}$/, 'must be 1 to 40 letters, digits, dots, dashes, slashes or underscores');

export const verdict = z.enum(['accept', 'reject', 'indeterminate', 'not-evaluable']);

export const role = z.enum(['inspector', 'reviewer', 'customer-quality', 'auditor', 'administrator']);
export type Role = z.output<typeof role>;

export const method = z.enum([
  'radiography',
  'penetrant',
  'ultrasonic-thickness',
  'dimensional',
  'visual',
  'airflow',
  'grain',
  'marking',
  'mass',
  'process',
]);

export const partState = z.enum([
  'position',
  'serialised',
  'in-process',
  'finished',
  'released',
  'shipped',
  'returned',
  'scrapped',
  'destroyed',
  'consumed',
]);

export const requirementState = z.enum([
  'open',
  'in-work',
  'met',
  'met-by-sample',
  'met-by-ancestor',
  'met-by-outside-certificate',
  'waived',
  'rejected',
  'awaiting-decision',
  'to-be-repeated',
]);
export type RequirementState = z.output<typeof requirementState>;

/** Keyset page asked for: `after` is the `next` of the page before. */
export const pageQuery = z.object({
  limit: z.coerce.number().int().min(1).max(200).default(50),
  after: z.string().max(400).optional(),
});

/** A keyset page: `next` is null on the last one. */
export function page<Item extends z.ZodType>(item: Item) {
  return z.object({ items: z.array(item), next: z.string().nullable() });
}

/** Password and, where the call allows it, PIN at the moment of signing. */
export const password = z.string().min(1, 'is needed to sign').max(200);

/** An exact decimal as text, `-0.10`: no exponent, comma, blank or plus sign. */
export const decimalText = z.string().regex(/^-?[0-9]{1,16}(?:\.[0-9]{1,16})?$/, 'must be a decimal such as 0.10');
