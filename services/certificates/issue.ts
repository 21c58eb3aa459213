import { Readable } from 'node:stream';
import { certificateByRelease, releaseRecord } from '@/db/repositories/certificates';
import { appendEvent } from '@/db/repositories/events';
import { thePlant } from '@/db/repositories/plants';
import { databaseNow, execute, inTransaction, reading, sqlTimeOf } from '@/db/work';
import { environment } from '@/services/environment';
import { enqueue } from '@/services/jobs/enqueue';
import { certificateRecord } from '@/services/pdf/certificate-record';
import { issueCertificate } from '@/services/seal/issue-certificate';
import { openPlantKeys } from '@/services/seal/plant-keys';
import { objectStore } from '@/services/storage/object-store';

/**
 * Lays out, seals and stores the certificate of a signed release, then marks it issued and puts its mail into the
 * outbox. Safe to run again: an issued one stays as it is.
 */
export async function issue(releaseId: string): Promise<{ readonly certificate: string }> {
  const known = await certificateByRelease(reading(), releaseId);
  const stored = await releaseRecord(reading(), releaseId);
  if (!known || !stored) throw new Error(`release ${releaseId} has no certificate row`);
  if (known.state !== 'signed') return { certificate: known.number };
  const settings = environment();
  const now = new Date(await databaseNow());
  const plant = await thePlant(reading());
  const keys = await openPlantKeys({
    folder: settings.RINGTRUE_KEYS_FOLDER,
    passphrase: settings.RINGTRUE_KEYS_PASSPHRASE,
    plantName: plant.name,
    now,
  });
  const record = certificateRecord.parse(JSON.parse(stored.record.toString('utf8')));
  const issued = await issueCertificate(record, { keys, sealedAt: now });
  const kept = await objectStore().putStream(Readable.from([Buffer.from(issued.bytes)]), {
    limitBytes: issued.bytes.length,
    announcedBytes: issued.bytes.length,
    mediaType: 'application/pdf',
  });
  await inTransaction(null, async (work) => {
    const changed = await execute(
      work,
      `UPDATE certificates SET state = 'issued', sha256 = ?, bytes = ?, storage_key = ?, issued_at = ?, version = version + 1 WHERE id = ? AND state = 'signed'`,
      [issued.sha256, kept.bytes, kept.key, sqlTimeOf(work.now), known.id],
    );
    if (changed === 0) return;
    await appendEvent(work, {
      kind: 'certificate-issued',
      subject: { kind: 'certificate', id: known.id },
      details: { certificate: known.number, sha256: issued.sha256, bytes: kept.bytes },
    });
    await enqueue(work, 'mail-certificate', { certificateId: known.id }, `mail-${known.id}`);
  });
  return { certificate: known.number };
}
