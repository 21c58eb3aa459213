import { z } from 'zod';
import { id, instant } from './common';
import { operation } from './operation';

/** Work done after a change was committed, as its state stands now. */
export const job = z.object({
  id,
  kind: z.string(),
  state: z.enum(['waiting', 'running', 'done', 'failed', 'cancelled']),
  /** Per cent. */
  progress: z.int().min(0).max(100),
  attempts: z.int(),
  /** What the work answered, once it is done. */
  result: z.unknown(),
  /** The last thing that stood in its way; it is tried again while the state is waiting. */
  error: z.string().nullable(),
  createdAt: instant,
  startedAt: instant.nullable(),
  finishedAt: instant.nullable(),
});
export type Job = z.output<typeof job>;

export const readJob = operation({
  name: 'read-job',
  method: 'GET',
  path: '/api/jobs/{id}',
  summary: 'One job: its own for who asked for it, any for administrators and auditors.',
  changes: false,
  params: z.object({ id }),
  response: job,
  status: 200,
});
