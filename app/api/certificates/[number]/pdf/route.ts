import { serveCertificate } from '@/services/certificates/serve-certificate';
import { downloadCertificate as contract } from '@/services/contracts/certificates';
import { route } from '@/services/http/route';

export const GET = route({
  contract,
  who: 'see-certificates',
  event: null,
  call: (reading, { params }) => serveCertificate(reading, params.number),
});
