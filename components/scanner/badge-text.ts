/** Badges begin with this word, so that no serial is taken for one. */
export const badgeStart = 'BADGE-';

export function isBadge(text: string): boolean {
  return text.toUpperCase().startsWith(badgeStart);
}

/** Where a person was at this workstation, so that they find it again when they badge in. */
const placeKey = (accountId: string) => `ringtrue-place:${accountId}`;

export function keepPlace(accountId: string, path: string): void {
  try {
    localStorage.setItem(placeKey(accountId), path);
  } catch {
    // A full or forbidden store only costs the way back.
  }
}

/** The page to go on at; today's when nothing is known. */
export function placeOf(accountId: string): string {
  try {
    const path = localStorage.getItem(placeKey(accountId)) ?? '/';
    return /^\/(?!\/)/.test(path) ? path : '/';
  } catch {
    return '/';
  }
}
