import { newId } from '@/db/identity';
import { takeRows } from '@/db/lock';
import { partsOfRelease, withdrawalsOf } from '@/db/repositories/certificates';
import { execute, sqlTimeOf, type Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { acknowledgeCertificate, Certificate, withdrawCertificate } from '@/services/contracts/certificates';
import type { BodyOf } from '@/services/contracts/operation';
import { Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { certificateFor, readCertificate } from './read-certificate';

type By = Work & { readonly actor: Actor };

/** The customer states what arrived. */
export async function acknowledge(
  work: By,
  number: string,
  body: BodyOf<typeof acknowledgeCertificate>,
): Promise<Recorded<Certificate>> {
  const row = await certificateFor(work, work.actor, number);
  if (row.state === 'signed') throw new Problem('state-refused', `Certificate ${number} is not issued yet.`);
  if (body.received === 'with-difference' && !body.note)
    throw new Problem('invalid-input', 'note: says what differs', [{ path: 'note', message: 'must say what differs' }]);
  const kind = body.received === 'complete' ? 'acknowledged' : 'received-with-difference';
  await execute(
    work,
    'INSERT INTO certificate_receipts (id, certificate_id, kind, note, by_account, at) VALUES (?, ?, ?, ?, ?, ?)',
    [newId(), row.id, kind, body.note ?? null, work.actor.id, sqlTimeOf(work.now)],
  );
  return {
    answer: await readCertificate(work, number),
    events: [
      {
        subject: { kind: 'certificate', id: row.id },
        details: { certificate: number, received: body.received, note: body.note ?? null },
      },
    ],
  };
}

/** Withdraws a certificate whole or for some serials; the paper stays, its answer to the world changes. */
export async function withdraw(
  work: By,
  number: string,
  body: BodyOf<typeof withdrawCertificate>,
): Promise<Recorded<Certificate>> {
  const known = await certificateFor(work, work.actor, number);
  const parts = await partsOfRelease(work, known.releaseId);
  const unknown = (body.serials ?? []).flatMap((serial, at) =>
    parts.some((part) => part.serial === serial)
      ? []
      : [{ path: `serials.${String(at)}`, message: `${serial} is not on this certificate` }],
  );
  if (unknown.length > 0) throw new Problem('invalid-input', 'serials: name serials that are not on this certificate', unknown);
  const gone = body.serials ? parts.filter(({ serial }) => body.serials?.includes(serial)) : parts;
  await takeRows(
    work,
    'parts',
    gone.map(({ id }) => id),
  );
  await takeRows(work, 'certificates', [known.id]);
  const row = await certificateFor(work, work.actor, number);
  if (row.state === 'withdrawn' || row.state === 'signed')
    throw new Problem('state-refused', `Certificate ${number} is ${row.state}.`);
  for (const part of body.serials ? gone : [null]) {
    await execute(
      work,
      'INSERT INTO certificate_withdrawals (id, certificate_id, part_id, reason, withdrawn_by, withdrawn_at) VALUES (?, ?, ?, ?, ?, ?)',
      [newId(), row.id, part?.id ?? null, body.reason, work.actor.id, sqlTimeOf(work.now)],
    );
  }
  const all = await withdrawalsOf(work, row.id);
  const whole =
    all.some(({ serial }) => serial === null) || parts.every(({ serial }) => all.some((one) => one.serial === serial));
  await execute(work, 'UPDATE certificates SET state = ? WHERE id = ?', [whole ? 'withdrawn' : 'partly-withdrawn', row.id]);
  return {
    answer: await readCertificate(work, number),
    events: [
      {
        subject: { kind: 'certificate', id: row.id },
        also: gone.map(({ id }) => ({ kind: 'part', id })),
        details: { certificate: number, serials: body.serials ?? 'all', reason: body.reason },
      },
    ],
  };
}
