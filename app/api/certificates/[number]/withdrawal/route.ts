import { confirmSignature } from '@/services/accounts/confirm-signature';
import { withdraw } from '@/services/certificates/answer-certificate';
import { withdrawCertificate as contract } from '@/services/contracts/certificates';
import { route } from '@/services/http/route';

export const POST = route({
  contract,
  who: 'withdraw-certificate',
  event: 'certificate-withdrawn',
  prepare: (actor, { body }) => confirmSignature(actor, body),
  call: (work, { params, body }) => withdraw(work, params.number, body),
});
