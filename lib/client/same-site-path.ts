const home = '/projects';

/** Where to go after signing in: the path asked for if it is one of this site, else the projects. Never another site. */
export function sameSitePath(asked: string | null | undefined): string {
  if (!asked?.startsWith('/') || !URL.canParse(asked, 'http://here.invalid')) return home;
  const url = new URL(asked, 'http://here.invalid');
  // "/.//elsewhere" is a path here until its dots are taken out; what is left of it would name another site.
  const isHere = url.origin === 'http://here.invalid' && !url.pathname.startsWith('//');
  return isHere ? `${url.pathname}${url.search}${url.hash}` : home;
}
