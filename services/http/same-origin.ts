import { Problem } from './problem';

/** A page of another site must not make this person's browser change anything. Programs send no Origin. */
export function refuseForeignOrigin(request: Request): void {
  const origin = request.headers.get('origin');
  if (origin === null) return;
  // `Origin: null` has no host and is nobody's own, also where a Host header is missing.
  const host = URL.canParse(origin) ? new URL(origin).host : '';
  const own = [request.headers.get('host'), new URL(process.env.RINGTRUE_BASE_URL ?? request.url).host];
  if (host === '' || !own.includes(host)) {
    throw new Problem('foreign-origin', `A request from ${origin.slice(0, 80)} may not change anything here.`);
  }
}
