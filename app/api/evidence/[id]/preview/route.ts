import { readEvidencePreview } from '@/services/contracts/evidence';
import { Raw, route } from '@/services/http/route';
import { visibleEvidence } from '@/services/inspections/see-evidence';
import { serveDerived } from '@/services/inspections/serve-evidence';

export const GET = route({
  contract: readEvidencePreview,
  who: 'see-evidence',
  event: null,
  call: async (reading, { params, request }) =>
    new Raw(await serveDerived(request, await visibleEvidence(reading, params.id), 'preview')),
});
