import { verifyByNumber } from '@/services/certificates/verify';
import { verifyCertificate as contract } from '@/services/contracts/certificates';
import { route } from '@/services/http/route';

export const GET = route({
  contract,
  who: 'anyone',
  event: null,
  call: (reading, { params, query, request }) => verifyByNumber(reading, params.number, query.check, request),
});
