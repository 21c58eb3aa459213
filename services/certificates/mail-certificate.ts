import { certificateById } from '@/db/repositories/certificates';
import { appendEvent } from '@/db/repositories/events';
import { thePlant } from '@/db/repositories/plants';
import { newId } from '@/db/identity';
import { execute, inTransaction, reading, selectOne, sqlTimeOf } from '@/db/work';
import { environment } from '@/services/environment';
import { certificateMail } from '@/services/mail/certificate-mail';
import { sendMail } from '@/services/mail/send-mail';

/**
 * Tells the customer's quality contact that a certificate is there. A mail on record is not sent again; should the server
 * take it and the record then fail, a second one carries the same message id.
 */
export async function mailCertificate(certificateId: string): Promise<{ readonly to: string }> {
  const certificate = await certificateById(reading(), certificateId);
  if (!certificate) throw new Error(`certificate ${certificateId} is not there`);
  const customer = await selectOne<{ email: string; locale: 'en' | 'fr' }>(
    reading(),
    'SELECT quality_email AS email, locale FROM customers WHERE id = ?',
    [certificate.customerId],
  );
  if (!customer) throw new Error('the certificate has no customer');
  const plant = await thePlant(reading());
  const { RINGTRUE_BASE_URL: address } = environment();
  const mail = certificateMail(customer.locale, { number: certificate.number, address, plant: plant.name });
  const sent = await selectOne(reading(), `SELECT id FROM mails WHERE recipient = ? AND subject = ? AND state = 'sent' LIMIT 1`, [
    customer.email,
    mail.subject,
  ]);
  if (sent) return { to: customer.email };
  await sendMail({ ...mail, to: customer.email, messageId: `<${certificateId}@${new URL(address).hostname}>` });
  await inTransaction(null, async (work) => {
    await execute(
      work,
      `INSERT INTO mails (id, recipient, subject, template, state, sent_at, created_at) VALUES (?, ?, ?, 'certificate', 'sent', ?, ?)`,
      [newId(), customer.email, mail.subject, sqlTimeOf(work.now), sqlTimeOf(work.now)],
    );
    await appendEvent(work, {
      kind: 'certificate-mailed',
      subject: { kind: 'certificate', id: certificateId },
      details: { certificate: certificate.number },
    });
  });
  return { to: customer.email };
}
