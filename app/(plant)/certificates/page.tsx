import { CertificatesPage } from '@/components/certificates/certificates-page';
import { pageActor } from '@/services/accounts/page-actor';

export default async function Certificates() {
  await pageActor('see-certificates');
  return <CertificatesPage />;
}
