import type { AboardLoop } from '@/lib/client/aboard';
import { Mark } from '../shell/mark';
import { Moment } from '../ui/moment';

/** In place of a loop's pages: which loop it is and how old what is shown here is. */
export function AboardHeader({ aboard }: { aboard?: AboardLoop }) {
  return (
    <header className="bg-sheet sticky top-0 z-30 flex min-h-14 flex-wrap items-center gap-x-4 border-b px-4 print:hidden">
      <Mark />
      {aboard ? (
        <>
          <strong className="min-w-0 truncate">{aboard.loop.name}</strong>
          <span className="text-quiet ml-auto text-sm">
            From this tablet, as of <Moment at={aboard.takenAt} />
          </span>
        </>
      ) : (
        <strong>Aboard</strong>
      )}
    </header>
  );
}
