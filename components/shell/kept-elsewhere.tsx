'use client';

import { usePathname } from 'next/navigation';
import { KeptStatus } from './kept-status';
import { useOutbox } from './outbox-provider';

/** On pages away from the stations: the line of what is not sent yet, for as long as there is something. */
export function KeptElsewhere() {
  const { state } = useOutbox();
  const pathname = usePathname();
  if (state.entries.length === 0 || pathname.includes('/commissioning')) return null;
  return (
    <div className="sticky bottom-0 z-20 print:hidden">
      <KeptStatus signInPath={pathname} />
    </div>
  );
}
