import { createHash, randomBytes } from 'node:crypto';
import { newId } from '@/db/identity';
import { keepMachineToken, machineTokens, revokeToken } from '@/db/repositories/machine-tokens';
import type { Reading, Work } from '@/db/work';
import type { createMachineToken as createContract, listMachineTokens as listContract } from '@/services/contracts/accounts';
import type { Actor } from '@/services/contracts/actor';
import type { AnswerOf, BodyOf, Operation } from '@/services/contracts/operation';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { allOperations } from '@/services/openapi/all-operations';

type By = Work & { readonly actor: Actor };

/** People's own affairs are no machine's: accounts, sessions, tokens, and whatever is signed. */
function isForMachines({ path, body }: Operation): boolean {
  if (/^\/api\/(account|people|machine-tokens|session|authorisations|vision-tests)(\/|$)/.test(path)) return false;
  const fields = body && 'shape' in body ? Object.keys(body.shape as object) : [];
  return !fields.includes('password') && !fields.includes('pin');
}

/** Names of the calls a token may be limited to. */
function callsForMachines(): string[] {
  return allOperations
    .filter(isForMachines)
    .map(({ name }) => name)
    .sort();
}

export async function listMachineTokens(reading: Reading): Promise<AnswerOf<typeof listContract>> {
  return { items: await machineTokens(reading), next: null, mayName: callsForMachines() };
}

/** Makes a token: 256 random bits, stored as SHA-256 and told once. Problem invalid-input for a call no token may make. */
export async function createMachineToken(
  work: By,
  body: BodyOf<typeof createContract>,
): Promise<Recorded<AnswerOf<typeof createContract>>> {
  const allowed = new Set(callsForMachines());
  const errors = body.calls.flatMap((call, at) =>
    allowed.has(call) ? [] : [{ path: `calls.${String(at)}`, message: `${call} is not a call a machine may make` }],
  );
  if (errors.length > 0) throw new Problem('invalid-input', 'calls: names calls a machine may not make', errors);
  const token = randomBytes(32).toString('base64url');
  const id = newId();
  const calls = [...new Set(body.calls)].sort();
  const digest = createHash('sha256').update(token).digest('hex');
  await keepMachineToken(work, { id, name: body.name, digest, calls, madeBy: work.actor.id });
  const [row] = await machineTokens(work, id);
  if (!row) throw new Error('the token just made is not there');
  return {
    answer: { ...row, token },
    events: [{ subject: { kind: 'machine-token', id }, details: { name: body.name, calls } }],
  };
}

/** Revokes a token from the next request on. */
export async function revokeMachineToken(work: By, id: string): Promise<Recorded<undefined>> {
  const [row] = await machineTokens(work, id);
  if (!row) throw notFound('Machine token');
  if (!(await revokeToken(work, id))) throw new Problem('state-refused', 'This token is revoked already.');
  return { answer: undefined, events: [{ subject: { kind: 'machine-token', id }, details: { name: row.name } }] };
}
