'use client';

import type { AnchorHTMLAttributes, MouseEvent } from 'react';

/** Goes to another station or back to the list without asking the server, so that it works where there is no signal. */
export function goTo(path: string): void {
  window.history.pushState(null, '', path);
  window.scrollTo(0, 0);
}

interface PlaceLinkProps extends AnchorHTMLAttributes<HTMLAnchorElement> {
  href: string;
  /** Asks the server for the page after all. */
  isOrdinary?: boolean;
}

/** A link within a loop's commissioning; opened in a new tab it is an ordinary link. */
export function PlaceLink({ href, isOrdinary, ...rest }: PlaceLinkProps) {
  const follow = (event: MouseEvent) => {
    if (isOrdinary || event.metaKey || event.ctrlKey || event.shiftKey || event.altKey || event.button !== 0) return;
    event.preventDefault();
    goTo(href);
  };
  return <a href={href} onClick={follow} {...rest} />;
}
