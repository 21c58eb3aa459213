import type { Reading } from '@/db/work';
import type { readingsFile } from '@/services/contracts/inspections';
import { criteriaOfRequirement } from '@/services/contracts/judging-input';
import type { AnswerOf, QueryOf } from '@/services/contracts/operation';
import { parseReadingsFile, type FileStation } from '@/services/contracts/readings-file';
import { databaseNow } from '@/db/work';
import { Problem } from '@/services/http/problem';
import { loadCase } from './load-case';

const mostBytes = 2 * 1024 * 1024;

async function textOf(request: Request): Promise<string> {
  const bytes = new Uint8Array(await request.arrayBuffer());
  if (bytes.byteLength > mostBytes) throw new Problem('too-large', 'A file of readings has at most 2 MiB.');
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    throw new Problem('unreadable-file', 'The file is not text in UTF-8. Export it again as CSV (UTF-8).');
  }
}

/** Parses a CSV against the characteristics of an inspection's requirement; nothing is stored. */
export async function readReadingsFile(
  reading: Reading,
  inspectionId: string,
  query: QueryOf<typeof readingsFile>,
  request: Request,
): Promise<AnswerOf<typeof readingsFile>> {
  const inspection = await loadCase(reading, inspectionId, await databaseNow(reading));
  if (Number(request.headers.get('content-length') ?? '0') > mostBytes)
    throw new Problem('too-large', 'A file of readings has at most 2 MiB.');
  const stations = criteriaOfRequirement(inspection.plan.criteria, inspection.asked).characteristics as FileStation[];
  const separator = query.separator === 'tab' ? '\t' : query.separator;
  const parsed = parseReadingsFile(await textOf(request), stations, { separator, decimalSign: query.decimalSign });
  return { ...parsed, readings: [...parsed.readings], faults: [...parsed.faults] };
}
