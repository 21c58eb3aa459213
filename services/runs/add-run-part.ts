import { takeRows } from '@/db/lock';
import { runById } from '@/db/repositories/runs';
import { partsWithSerial } from '@/db/repositories/scans';
import { execute, sqlTimeOf, type Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { BodyOf } from '@/services/contracts/operation';
import type { addRunPart as contract, RunAnswer } from '@/services/contracts/runs';
import { readScan } from '@/services/contracts/scan-text';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { readRun } from './read-run';

// One run is one load; the largest furnace holds fewer.
const mostParts = 2000;

/** Adds one part to a run; the same part again changes nothing. Problems: not-found, invalid-input. */
export async function addRunPart(
  work: Work & { readonly actor: Actor },
  runId: string,
  body: BodyOf<typeof contract>,
): Promise<Recorded<RunAnswer>> {
  await takeRows(work, 'runs', [runId]);
  const run = await runById(work, runId);
  if (!run) throw notFound('Run');
  const read = readScan(body.scan);
  const named = (read ? await partsWithSerial(work, read.serial) : []).filter(
    ({ partNumber }) => read?.partNumber === null || partNumber === read?.partNumber,
  );
  const message =
    named.length === 0
      ? 'no part has this serial'
      : named.length > 1
        ? `is a serial of ${named.map(({ partNumber }) => partNumber).join(' and ')}; name the part number before it`
        : run.parts >= mostParts
          ? `a run takes ${String(mostParts)} parts`
          : null;
  const part = named[0];
  if (message !== null || !part)
    throw new Problem('invalid-input', `scan: ${message ?? ''}`, [{ path: 'scan', message: message ?? '' }]);
  const added = await execute(work, 'INSERT IGNORE INTO run_parts (run_id, part_id, place, added_at) VALUES (?, ?, ?, ?)', [
    runId,
    part.id,
    body.place ?? null,
    sqlTimeOf(work.now),
  ]);
  return {
    answer: await readRun(work, runId),
    ...(added === 0 ? { status: 200 } : {}),
    events:
      added === 0
        ? []
        : [
            {
              subject: { kind: 'run', id: runId },
              also: [{ kind: 'part', id: part.id }],
              details: { number: run.number, added: part.serial, place: body.place ?? null },
            },
          ],
  };
}
