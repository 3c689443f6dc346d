const home = '/projects';

/** Where to go after signing in: the path asked for if it is one of this site, else the projects. Never another site. */
export function sameSitePath(asked: string | null | undefined): string {
  if (!asked?.startsWith('/') || !URL.canParse(asked, 'http://here.invalid')) return home;
  const url = new URL(asked, 'http://here.invalid');
  return url.origin === 'http://here.invalid' ? `${url.pathname}${url.search}${url.hash}` : home;
}
