import { readHealth as contract } from '@/services/contracts/health';
import { lookAtHealth } from '@/services/health/look-at-health';
import { route } from '@/services/http/route';

export const GET = route({ contract, who: 'anyone', event: null, call: () => lookAtHealth() });
