/**
 * The path of this product that may follow a sign-in; `/` for anything that leads elsewhere. Read as a browser reads it:
 * it drops tabs and line ends and takes a backslash for a slash, so that a look at the first characters is not enough.
 */
export function ownPath(next: string | undefined): string {
  const here = 'http://ringtrue.invalid';
  if (next === undefined || !next.startsWith('/') || !URL.canParse(next, here)) return '/';
  const { origin, pathname, search, hash } = new URL(next, here);
  // A second look, because a path such as /.//elsewhere is normalised to one that leads elsewhere.
  const own = origin === here && !pathname.startsWith('//') && !/^\/(api|sign-in)(\/|$)/.test(pathname);
  return own ? `${pathname}${search}${hash}` : '/';
}
