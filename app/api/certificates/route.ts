import { listCertificates } from '@/services/certificates/read-certificate';
import { listCertificates as contract } from '@/services/contracts/certificates';
import { route } from '@/services/http/route';

export const GET = route({
  contract,
  who: 'see-certificates',
  event: null,
  call: (reading, { query }) => listCertificates(reading, query),
});
