import { verifyFile } from '@/services/certificates/verify';
import { verifyFile as contract } from '@/services/contracts/certificates';
import { route } from '@/services/http/route';

export const POST = route({ contract, who: 'anyone', event: null, call: (reading, { request }) => verifyFile(reading, request) });
