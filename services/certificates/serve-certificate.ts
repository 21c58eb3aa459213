import { Readable } from 'node:stream';
import { newId } from '@/db/identity';
import { appendEvent } from '@/db/repositories/events';
import { execute, inTransaction, sqlTimeOf, type Reading } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import { Problem } from '@/services/http/problem';
import { Raw } from '@/services/http/route';
import { objectStore } from '@/services/storage/object-store';
import { certificateFor } from './read-certificate';

/** The sealed PDF. A customer's download is kept as a receipt with its event. Problems: not-found, state-refused, store-unavailable. */
export async function serveCertificate(reading: Reading & { readonly actor: Actor }, number: string): Promise<Raw> {
  const row = await certificateFor(reading, reading.actor, number);
  if (row.storageKey === null || row.sha256 === null)
    throw new Problem('state-refused', `Certificate ${number} is signed and not issued yet. It appears here in a moment.`);
  const stream = await objectStore().getStream(row.storageKey);
  if (reading.actor.role === 'customer-quality') {
    await inTransaction(reading.actor, async (work) => {
      await execute(
        work,
        `INSERT INTO certificate_receipts (id, certificate_id, kind, by_account, at) VALUES (?, ?, 'downloaded', ?, ?)`,
        [newId(), row.id, reading.actor.id, sqlTimeOf(work.now)],
      );
      await appendEvent(work, {
        kind: 'certificate-downloaded',
        subject: { kind: 'certificate', id: row.id },
        details: { certificate: number },
      });
    });
  }
  return new Raw(
    new Response(Readable.toWeb(stream) as ReadableStream<Uint8Array>, {
      headers: {
        'content-type': 'application/pdf',
        'content-length': String(row.bytes),
        'content-disposition': `attachment; filename="${number}.pdf"`,
        'repr-digest': `sha-256=:${Buffer.from(row.sha256, 'hex').toString('base64')}:`,
        etag: `"${row.sha256}"`,
        'x-content-type-options': 'nosniff',
        'cache-control': 'private, no-cache',
      },
    }),
  );
}
