import { CertificatePage } from '@/components/certificates/certificate-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Certificate({ params }: { params: Promise<{ number: string }> }) {
  const actor = await pageActor('see-certificates');
  const { number } = await params;
  return <CertificatePage number={number} mayAcknowledge={may(actor, 'acknowledge-certificate')} />;
}
