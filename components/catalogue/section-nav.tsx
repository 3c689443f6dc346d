'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { classNames } from '../ui/class-names';

const sections = [
  ['valves', 'Valves'],
  ['pumps', 'Pumps'],
  ['pipes', 'Pipes'],
  ['fittings', 'Fittings'],
] as const;

/** The four parts of the catalogue. */
export function SectionNav() {
  const path = usePathname();
  return (
    <nav aria-label="Parts of the catalogue" className="mb-5 flex gap-1 border-b">
      {sections.map(([part, words]) => {
        const isHere = path.startsWith(`/catalogue/${part}`);
        return (
          <Link
            key={part}
            href={`/catalogue/${part}`}
            aria-current={isHere ? 'page' : undefined}
            className={classNames(
              'text-ink -mb-px inline-flex min-h-10 items-center border-b-2 px-3 font-semibold no-underline pointer-coarse:min-h-11',
              isHere ? 'border-petrol' : 'hover:border-rule border-transparent',
            )}
          >
            {words}
          </Link>
        );
      })}
    </nav>
  );
}
