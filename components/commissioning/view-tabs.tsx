import { openChecks } from '@/lib/commissioning/readiness-checks';
import { classNames } from '../ui/class-names';
import type { Commissioning } from './commissioning-context';
import { PlaceLink } from './place-link';
import type { CommissioningView } from './views';

/** The parts of a loop's commissioning, each without asking the server. */
export function ViewTabs({ commissioning, here }: { commissioning: Commissioning; here: CommissioningView }) {
  const { base, site } = commissioning;
  const open = openChecks(site.checks).length;
  const snags = site.snags.filter(({ resolution }) => !resolution).length;
  const tabs: [CommissioningView, string, number][] = [
    ['stations', 'Stations', 0],
    ['readiness', 'Readiness', open],
    ['next', 'Next', 0],
    ['findings', 'Findings', 0],
    ['rounds', 'Rounds', 0],
    ['snags', 'Snags', snags],
  ];
  return (
    <nav aria-label="Parts of commissioning" className="bg-sheet flex overflow-x-auto border-b px-2 print:hidden">
      {tabs.map(([view, name, count]) => (
        <PlaceLink
          key={view}
          href={view === 'stations' ? base : `${base}/${view}`}
          aria-current={view === here ? 'page' : undefined}
          className={classNames(
            'inline-flex min-h-12 items-center gap-1.5 border-b-[3px] px-3 pt-[3px] font-semibold whitespace-nowrap no-underline',
            view === here ? 'border-brass text-ink' : 'text-quiet hover:border-rule border-transparent',
          )}
        >
          {name}
          {count > 0 && <span className="figures bg-well text-ink rounded px-1.5 text-sm">{count}</span>}
        </PlaceLink>
      ))}
    </nav>
  );
}
