import { createTransport } from 'nodemailer';
import { environment } from '@/services/environment';

/** Sends one mail by SMTP. Throws when the server does not take it: the job tries again. */
export async function sendMail(mail: {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  readonly messageId: string;
}): Promise<void> {
  const settings = environment();
  const transport = createTransport({
    url: settings.RINGTRUE_SMTP_URL,
    connectionTimeout: 8000,
    greetingTimeout: 8000,
    socketTimeout: 15000,
  });
  try {
    await transport.sendMail({ from: settings.RINGTRUE_MAIL_FROM, ...mail });
  } finally {
    transport.close();
  }
}
