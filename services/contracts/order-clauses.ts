import { z } from 'zod';
import { words } from './common';

/** A statement that the certificate repeats, under the order's own code for it. */
const statement = z.strictObject({ code: words(40), text: words(600) });

/** What an order line demands beside the drawing. */
export const orderClauses = z.strictObject({
  /** The customer may see the pictures of the inspections of its released parts. */
  images: z.boolean().default(false),
  /** The customer may see the measured values. */
  values: z.boolean().default(false),
  /** Printed on the certificate, in this order. */
  statements: z.array(statement).max(60).default([]),
  /** Years for which the records are kept. */
  retentionYears: z.int().min(1).max(100).optional(),
});
export type OrderClauses = z.output<typeof orderClauses>;

/** The statements of a text with one on each line: the code, a blank, the words. Lines without words are left out. */
export function statementsOfText(text: string): OrderClauses['statements'] {
  return text.split('\n').flatMap((line) => {
    const [, code, words] = /^\s*(\S+)\s+(.*\S)\s*$/.exec(line) ?? [];
    return code === undefined || words === undefined ? [] : [{ code, text: words }];
  });
}
