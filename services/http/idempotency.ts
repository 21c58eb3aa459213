import { createHash } from 'node:crypto';
import { execute, selectOne, sqlTimeOf, type Work } from '@/db/work';
import type { Operation } from '@/services/contracts/operation';
import { Problem } from './problem';

interface Asked {
  readonly request: Request;
  readonly params: unknown;
  readonly query: unknown;
  readonly body: unknown;
}

function keyOf(asked: Asked): string | null {
  const key = asked.request.headers.get('idempotency-key');
  if (key === null) return null;
  if (!/^[\x21-\x7e]{1,100}$/.test(key))
    throw new Problem('invalid-input', 'Idempotency-Key must be 1 to 100 visible ASCII characters.', [
      { path: 'Idempotency-Key', message: 'must be 1 to 100 visible ASCII characters' },
    ]);
  return key;
}

/**
 * When this person already sent this key: the stored answer (the same request), or the problem key-reused.
 * The key is inserted first, so two at once queue on it and the second finds the first's answer.
 */
export async function replayed(work: Work, contract: Operation, asked: Asked): Promise<Response | null> {
  const key = keyOf(asked);
  if (key === null || !work.actor) return null;
  const digest = createHash('sha256')
    .update(JSON.stringify([contract.name, asked.params ?? null, asked.query ?? null, asked.body ?? null]))
    .digest('hex');
  const inserted = await execute(
    work,
    'INSERT IGNORE INTO idempotency_keys (account_id, request_key, call_name, body_digest, created_at) VALUES (?, ?, ?, ?, ?)',
    [work.actor.id, key, contract.name, digest, sqlTimeOf(work.now)],
  );
  if (inserted === 1) return null;
  const row = await selectOne<{ digest: string; status: number | null; answer: string | null }>(
    work,
    'SELECT body_digest AS digest, status, answer FROM idempotency_keys WHERE account_id = ? AND request_key = ?',
    [work.actor.id, key],
  );
  if (!row || row.digest !== digest) throw new Problem('key-reused', 'This Idempotency-Key was used for another request.');
  return new Response(row.answer, {
    status: row.status ?? 200,
    headers: { 'content-type': 'application/json', 'cache-control': 'no-store', 'idempotent-replay': 'true' },
  });
}

/** Keeps the answer beside its key, in the transaction of the change. */
export async function rememberAnswer(work: Work, asked: Asked, response: Response): Promise<Response> {
  const key = keyOf(asked);
  if (key === null || !work.actor) return response;
  const answer = response.status === 204 ? null : await response.clone().text();
  await execute(work, 'UPDATE idempotency_keys SET status = ?, answer = ? WHERE account_id = ? AND request_key = ?', [
    response.status,
    answer,
    work.actor.id,
    key,
  ]);
  return response;
}
