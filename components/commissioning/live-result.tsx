import type { ReactNode } from 'react';
import { Deviation } from '../ui/deviation';
import { Figure, UnitName } from '../ui/figure';
import { bandWords } from './commissioning-context';
import type { Entry } from './use-entry';

const certaintyWords = { yes: 'yes', no: 'no', 'too-near': 'too near to tell' } as const;

/** What the figures say, worked out on this device at each key: flow, per cent of design, and whether it is surely within its band. */
export function LiveResult({ entry }: { entry: Entry }) {
  const { judgement, band, meter } = entry;
  return (
    <output aria-live="polite" className="bg-sheet grid grid-cols-2 rounded border sm:grid-cols-[1fr_1fr_1.35fr]">
      <Cell name="Flow">
        <Figure quantity="flow" si={judgement?.flowLs} className="text-2xl font-bold" />
        <span className="text-quiet ml-1.5 text-sm">
          <UnitName quantity="flow" />
        </span>
      </Cell>
      <Cell name="Of design">
        {judgement ? (
          <Deviation percent={judgement.percentOfDesign} verdict={judgement.verdict} className="text-2xl font-bold" />
        ) : (
          <span className="figures text-2xl font-bold">–</span>
        )}
        <span className="text-quiet ml-1.5 text-sm">%</span>
      </Cell>
      <Cell name={`Within ${bandWords(band)}, uncertainty`} isLast>
        {judgement && meter ? (
          <span className="whitespace-nowrap">
            <span className="text-lg font-semibold">{certaintyWords[judgement.certainty]}</span>
            <span className="figures ml-2 text-lg font-bold">±{judgement.uncertaintyPercent.toFixed(1)}</span>
            <span className="text-quiet ml-1 text-sm">%</span>
          </span>
        ) : (
          <span className="text-quiet">{judgement ? 'needs a meter' : '–'}</span>
        )}
      </Cell>
    </output>
  );
}

const Cell = ({ name, isLast, children }: { name: string; isLast?: boolean; children: ReactNode }) => (
  <span
    className={`block min-w-0 px-4 pt-2 pb-2.5 ${isLast ? 'col-span-2 border-t sm:col-span-1 sm:border-t-0 sm:border-l' : 'not-first:border-l'}`}
  >
    <span className="text-quiet block truncate text-sm">{name}</span>
    <span className="flex min-h-9 items-baseline">{children}</span>
  </span>
);
