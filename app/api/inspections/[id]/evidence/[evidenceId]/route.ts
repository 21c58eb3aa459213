import { linkEvidence as linkContract, unlinkEvidence as unlinkContract } from '@/services/contracts/inspections';
import { route } from '@/services/http/route';
import { linkEvidence, unlinkEvidence } from '@/services/inspections/link-evidence';

export const PUT = route({
  contract: linkContract,
  who: 'inspect',
  event: 'evidence-linked',
  call: (work, { params, body }) => linkEvidence(work, params.id, params.evidenceId, body),
});

export const DELETE = route({
  contract: unlinkContract,
  who: 'inspect',
  event: 'evidence-unlinked',
  call: (work, { params }) => unlinkEvidence(work, params.id, params.evidenceId),
});
