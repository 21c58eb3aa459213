import { createHash } from 'node:crypto';
import { newId } from '@/db/identity';
import { execute, selectOne, sqlTimeOf, type Work } from '@/db/work';

/** Failed tries allowed within the window, for one e-mail and for one address (a whole shop sits behind one address). */
export const attemptLimits = { perEmail: 10, perAddress: 100, windowMinutes: 15 } as const;

export function emailDigest(email: string): string {
  return createHash('sha256').update(email.trim().toLowerCase()).digest('hex');
}

/** Seconds to wait before this e-mail or address may try again; 0 when it may now. */
export async function secondsToWait(work: Work, email: string, address: string): Promise<number> {
  const row = await selectOne<{ byEmail: number; byAddress: number }>(
    work,
    `SELECT (SELECT COUNT(*) FROM sign_ins WHERE email_digest = ? AND outcome = 'refused' AND at > ? - INTERVAL ? MINUTE) AS byEmail,
            (SELECT COUNT(*) FROM sign_ins WHERE address = ? AND outcome = 'refused' AND at > ? - INTERVAL ? MINUTE) AS byAddress`,
    [
      emailDigest(email),
      sqlTimeOf(work.now),
      attemptLimits.windowMinutes,
      address,
      sqlTimeOf(work.now),
      attemptLimits.windowMinutes,
    ],
  );
  const limited = (row?.byEmail ?? 0) >= attemptLimits.perEmail || (row?.byAddress ?? 0) >= attemptLimits.perAddress;
  return limited ? attemptLimits.windowMinutes * 60 : 0;
}

/** Keeps that somebody tried; the e-mail only as a digest. */
export async function rememberAttempt(
  work: Work,
  attempt: {
    readonly email: string;
    readonly accountId: string | null;
    readonly address: string;
    readonly outcome: 'signed-in' | 'refused' | 'limited';
  },
): Promise<void> {
  await execute(work, 'INSERT INTO sign_ins (id, account_id, email_digest, address, outcome, at) VALUES (?, ?, ?, ?, ?, ?)', [
    newId(),
    attempt.accountId,
    emailDigest(attempt.email),
    attempt.address,
    attempt.outcome,
    sqlTimeOf(work.now),
  ]);
}
