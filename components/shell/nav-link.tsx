'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';
import type { ReactNode } from 'react';
import { classNames } from '../ui/class-names';

/** A page of the bar at the top: a brass line under the one that is open. */
export function NavLink({ href, children }: { href: string; children: ReactNode }) {
  const isHere = usePathname().startsWith(href);
  return (
    <Link
      href={href}
      aria-current={isHere ? 'page' : undefined}
      className={classNames(
        'text-ink inline-flex h-full min-h-11 items-center border-b-[3px] px-1 pt-[3px] font-semibold whitespace-nowrap no-underline',
        isHere ? 'border-brass' : 'hover:border-rule border-transparent',
      )}
    >
      {children}
    </Link>
  );
}
