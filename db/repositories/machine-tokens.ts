import type { MachineToken } from '../../services/contracts/accounts';
import { execute, isoOf, select, sqlTimeOf, type Reading, type Work } from '../work';

/** Machine tokens, newest first; one when an id is given. */
export async function machineTokens(reading: Reading, tokenId: string | null = null): Promise<MachineToken[]> {
  const rows = await select<Omit<MachineToken, 'calls'> & { calls: string }>(
    reading,
    `SELECT t.id, t.name, t.calls, a.name AS madeBy, ${isoOf('t.created_at')} AS createdAt, ${isoOf('t.revoked_at')} AS revokedAt
     FROM machine_tokens t JOIN accounts a ON a.id = t.made_by WHERE ? IS NULL OR CAST(t.id AS CHAR) = ? ORDER BY t.created_at DESC, t.id DESC LIMIT 200`,
    [tokenId, tokenId],
  );
  return rows.map((row) => ({ ...row, calls: JSON.parse(row.calls) as string[] }));
}

export async function keepMachineToken(
  work: Work,
  token: {
    readonly id: string;
    readonly name: string;
    readonly digest: string;
    readonly calls: readonly string[];
    readonly madeBy: string;
  },
): Promise<void> {
  await execute(
    work,
    'INSERT INTO machine_tokens (id, name, token_digest, calls, made_by, created_at) VALUES (?, ?, ?, ?, ?, ?)',
    [token.id, token.name, token.digest, JSON.stringify(token.calls), token.madeBy, sqlTimeOf(work.now)],
  );
}

/** Revokes a token that is in force; answers whether there was one. */
export async function revokeToken(work: Work, tokenId: string): Promise<boolean> {
  return (
    (await execute(work, 'UPDATE machine_tokens SET revoked_at = ? WHERE id = ? AND revoked_at IS NULL', [
      sqlTimeOf(work.now),
      tokenId,
    ])) === 1
  );
}
