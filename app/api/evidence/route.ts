import { admitEvidence as contract } from '@/services/contracts/evidence';
import { route } from '@/services/http/route';
import { admitEvidence } from '@/services/inspections/admit-evidence';
import { receiveEvidence } from '@/services/inspections/receive-evidence';

export const POST = route({
  contract,
  who: 'inspect',
  event: 'evidence-admitted',
  prepare: (_actor, { query, request }) => receiveEvidence(query, request),
  call: (work, { query }, file) => admitEvidence(work, query, file),
});
