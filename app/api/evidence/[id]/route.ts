import { readEvidence } from '@/services/contracts/evidence';
import { Raw, route } from '@/services/http/route';
import { visibleEvidence } from '@/services/inspections/see-evidence';
import { serveOriginal } from '@/services/inspections/serve-evidence';

export const GET = route({
  contract: readEvidence,
  who: 'see-evidence',
  event: null,
  call: async (reading, { params, request }) => new Raw(await serveOriginal(request, await visibleEvidence(reading, params.id))),
});
