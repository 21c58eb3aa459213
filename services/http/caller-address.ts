/**
 * The caller's network address as the nearest proxy reports it (last X-Forwarded-For entry, which a client cannot set
 * past a proxy that appends), or `direct`.
 */
export function callerAddress(request: Request): string {
  const forwarded = request.headers.get('x-forwarded-for')?.split(',').at(-1)?.trim();
  return (forwarded ?? 'direct').slice(0, 64);
}
