import { measurementProcessesBefore, techniqueById, techniquesAfter } from '@/db/repositories/techniques';
import type { Reading } from '@/db/work';
import type { AnswerOf, QueryOf } from '@/services/contracts/operation';
import type {
  listMeasurementProcesses as processesContract,
  listTechniques as listContract,
  Technique,
} from '@/services/contracts/techniques';
import { pageOf, partsOfKey } from '@/services/http/keyset';
import { notFound } from '@/services/http/problem';
import { Raw } from '@/services/http/route';
import { techniqueFaults } from './technique-faults';

/** One technique issue with what stands against checking it. Problem not-found. */
export async function technique(reading: Reading, techniqueId: string): Promise<Technique> {
  const row = await techniqueById(reading, techniqueId);
  if (!row) throw notFound('Technique issue');
  return { ...row, faults: row.state === 'draft' ? techniqueFaults(row.content) : [] };
}

/** The same with its version as ETag. */
export async function readTechnique(reading: Reading, techniqueId: string): Promise<Raw> {
  const row = await technique(reading, techniqueId);
  return new Raw(Response.json(row, { headers: { etag: `"${String(row.version)}"`, 'cache-control': 'no-store' } }));
}

/** Technique issues by number, newest issue first. */
export async function listTechniques(
  reading: Reading,
  { limit, after, ...filter }: QueryOf<typeof listContract>,
): Promise<AnswerOf<typeof listContract>> {
  const key = partsOfKey(after, 2);
  const rows = await techniquesAfter(reading, filter, limit + 1, key && [String(key[0]), Number(key[1])]);
  return pageOf(
    rows,
    limit,
    ({ number, issue }) => [number, issue],
    (row) => row,
  );
}

/** Uncertainties of measurement processes, newest first. */
export async function listMeasurementProcesses(
  reading: Reading,
  { limit, after, technique: number }: QueryOf<typeof processesContract>,
): Promise<AnswerOf<typeof processesContract>> {
  const key = partsOfKey(after, 1);
  const rows = await measurementProcessesBefore(reading, number ?? null, limit + 1, key && String(key[0]));
  return pageOf(
    rows,
    limit,
    ({ id }) => [id],
    (row) => row,
  );
}
