import { readEvidenceFacts } from '@/services/contracts/evidence';
import { route } from '@/services/http/route';
import { describeFile } from '@/services/inspections/describe-evidence';
import { visibleEvidence } from '@/services/inspections/see-evidence';

export const GET = route({
  contract: readEvidenceFacts,
  who: 'see-evidence',
  event: null,
  call: async (reading, { params }) => describeFile(await visibleEvidence(reading, params.id)),
});
