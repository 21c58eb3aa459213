import { readCertificate } from '@/services/certificates/read-certificate';
import { readCertificate as contract } from '@/services/contracts/certificates';
import { route } from '@/services/http/route';

export const GET = route({
  contract,
  who: 'see-certificates',
  event: null,
  call: (reading, { params }) => readCertificate(reading, params.number),
});
