import { acknowledge } from '@/services/certificates/answer-certificate';
import { acknowledgeCertificate as contract } from '@/services/contracts/certificates';
import { route } from '@/services/http/route';

export const POST = route({
  contract,
  who: 'acknowledge-certificate',
  event: 'certificate-acknowledged',
  call: (work, { params, body }) => acknowledge(work, params.number, body),
});
