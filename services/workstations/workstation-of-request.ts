import { createHash } from 'node:crypto';
import { workstationByToken } from '@/db/repositories/workstations';
import { reading } from '@/db/work';
import type { ScanPrefix } from '@/services/contracts/workstations';

export const workstationCookie = 'ringtrue-workstation';

export function tokenDigestOf(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}

function tokenOf(request: Request): string | undefined {
  const cookies = request.headers.get('cookie') ?? '';
  return new RegExp(`(?:^|;\\s*)${workstationCookie}=([A-Za-z0-9_-]{20,100})(?:;|$)`).exec(cookies)?.[1];
}

/** The registered workstation a request comes from, by its cookie; null anywhere else. */
export async function workstationOfRequest(
  request: Request,
): Promise<{ readonly id: string; readonly name: string; readonly scanPrefix: ScanPrefix } | null> {
  const token = tokenOf(request);
  return token === undefined ? null : ((await workstationByToken(reading(), tokenDigestOf(token))) ?? null);
}
