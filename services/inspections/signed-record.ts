import { z } from 'zod';
import { evaluation } from '@/services/contracts/evaluate';
import { inspectionContent } from '@/services/contracts/inspection-content';

/** Schema version of the signed payload; a reader for every version stays. */
export const recordSchema = 1;

const recordV1 = z.looseObject({
  schema: z.literal(1),
  content: inspectionContent,
  criteria: z.record(z.string(), z.unknown()),
  evaluation,
});

export type InspectionRecord = z.output<typeof recordV1>;

/** Reads the canonical bytes of a signed inspection. Throws when they are of no known version: that is damage, not input. */
export function readRecord(bytes: Buffer): InspectionRecord {
  return recordV1.parse(JSON.parse(bytes.toString('utf8')));
}
