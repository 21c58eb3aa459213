import { createHash, timingSafeEqual } from 'node:crypto';
import { certificateByDigest, certificateByNumber, withdrawalsOf, type CertificateRow } from '@/db/repositories/certificates';
import { inTransaction, reading, type Reading } from '@/db/work';
import { rememberAttempt, secondsToWait } from '@/services/accounts/rate-limit';
import type { VerifyAnswer } from '@/services/contracts/certificates';
import { environment } from '@/services/environment';
import { callerAddress } from '@/services/http/caller-address';
import { Problem } from '@/services/http/problem';
import { readPlantRoots } from '@/services/seal/plant-roots';
import { verifySealedPdf } from '@/services/seal/verify-sealed-pdf';

const mostFileBytes = 20 * 1024 * 1024;
const nothing: VerifyAnswer = {
  state: 'unknown',
  number: null,
  issuedAt: null,
  partNumber: null,
  quantity: null,
  withdrawnSerials: [],
  replacedBy: null,
};
const spoken = {
  issued: 'valid',
  signed: 'unknown',
  'partly-withdrawn': 'valid-except',
  withdrawn: 'withdrawn',
  superseded: 'superseded',
} as const;

function sameCode(one: string, other: string): boolean {
  const digest = (text: string) => createHash('sha256').update(text.trim().toUpperCase()).digest();
  return timingSafeEqual(digest(one), digest(other));
}

async function told(row: CertificateRow): Promise<VerifyAnswer> {
  if (row.state === 'signed') return nothing;
  const withdrawals = await withdrawalsOf(reading(), row.id);
  return {
    state: spoken[row.state],
    number: row.number,
    issuedAt: row.issuedAt,
    partNumber: row.partNumber,
    quantity: row.quantity,
    withdrawnSerials: withdrawals.flatMap(({ serial }) => (serial === null ? [] : [serial])),
    replacedBy: row.replacedBy,
  };
}

interface Guess {
  /** What was guessed at, counted for itself. */
  readonly about: string;
  readonly address: string;
}

/** Guesses are counted apart from sign-ins; the column holds 64 characters, of which an address may fill all. */
function guessOf(request: Request, kind: 'code' | 'file', about: string): Guess {
  const address = `verify-${kind} ${callerAddress(request)}`.slice(0, 64);
  return { about: kind === 'code' ? address : `${address} ${about}`, address };
}

async function refuseGuessing({ about, address }: Guess): Promise<void> {
  const wait = await inTransaction(null, (work) => secondsToWait(work, about, address));
  if (wait > 0)
    throw new Problem('too-many-attempts', `Too many wrong answers. Try again in ${String(wait / 60)} minutes.`, [], {
      retryAfterS: wait,
    });
}

async function countGuess({ about, address }: Guess): Promise<void> {
  await inTransaction(null, (work) => rememberAttempt(work, { email: about, accountId: null, address, outcome: 'refused' }));
}

/** A certificate by number and check code; a wrong code answers as an unknown number does. Problem too-many-attempts. */
export async function verifyByNumber(reader: Reading, number: string, check: string, request: Request): Promise<VerifyAnswer> {
  const guess = guessOf(request, 'code', number);
  await refuseGuessing(guess);
  const row = await certificateByNumber(reader, number, null);
  if (row && sameCode(row.checkCode, check)) return told(row);
  await countGuess(guess);
  return nothing;
}

/** The body, at most 20 MiB; an announced length that is more is refused before a byte is read. */
async function bytesOf(request: Request): Promise<Buffer> {
  if (Number(request.headers.get('content-length') ?? 0) > mostFileBytes)
    throw new Problem('too-large', 'A certificate file is at most 20 MiB.');
  const chunks: Uint8Array[] = [];
  let size = 0;
  const reader = request.body?.getReader();
  for (let next = await reader?.read(); next && !next.done; next = await reader?.read()) {
    size += next.value.byteLength;
    if (size > mostFileBytes) throw new Problem('too-large', 'A certificate file is at most 20 MiB.');
    chunks.push(next.value);
  }
  return Buffer.concat(chunks);
}

function digestIn(body: Buffer): string | null {
  try {
    const { sha256 } = JSON.parse(body.toString('utf8')) as { sha256?: unknown };
    return typeof sha256 === 'string' && /^[0-9a-f]{64}$/.test(sha256) ? sha256 : null;
  } catch {
    return null;
  }
}

async function judged(reader: Reading, body: Buffer, digest: string): Promise<VerifyAnswer> {
  const known = await certificateByDigest(reader, digest);
  if (known) return told(known);
  const roots = await readPlantRoots(environment().RINGTRUE_KEYS_FOLDER);
  const { state } = await verifySealedPdf(body, { trustedRoots: roots });
  // A file of ours with other bytes than those issued is not the certificate, whatever its seal says.
  return { ...nothing, state: state === 'not-sealed-here' ? 'unknown' : 'altered' };
}

/**
 * A certificate file: known by its digest, else judged by its seal. A digest alone that is not ours is unknown.
 * Problems: too-large, invalid-input, too-many-attempts (the same file again and again, or very many from one address).
 */
export async function verifyFile(reader: Reading, request: Request): Promise<VerifyAnswer> {
  await refuseGuessing(guessOf(request, 'file', ''));
  const body = await bytesOf(request);
  if (!(request.headers.get('content-type') ?? '').includes('json')) {
    const digest = createHash('sha256').update(body).digest('hex');
    const guess = guessOf(request, 'file', digest);
    await refuseGuessing(guess);
    const answer = await judged(reader, body, digest);
    if (answer.number === null) await countGuess(guess);
    return answer;
  }
  const digest = digestIn(body);
  if (digest === null)
    throw new Problem('invalid-input', 'sha256: must be 64 hexadecimal digits', [
      { path: 'sha256', message: 'must be 64 hexadecimal digits' },
    ]);
  const known = await certificateByDigest(reader, digest);
  return known ? told(known) : nothing;
}
