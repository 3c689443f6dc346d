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
    <output aria-live="polite" className="bg-sheet grid grid-cols-3 rounded border sm:grid-cols-[1fr_1fr_1.35fr]">
      <Cell name="Flow">
        <Figure quantity="flow" si={judgement?.flowLs} className="text-xl font-bold sm:text-2xl" />
        <span className="text-quiet ml-1.5 text-sm">
          <UnitName quantity="flow" />
        </span>
      </Cell>
      <Cell name="Of design">
        {judgement ? (
          <Deviation percent={judgement.percentOfDesign} verdict={judgement.verdict} className="text-xl font-bold sm:text-2xl" />
        ) : (
          <span className="figures text-xl font-bold sm:text-2xl">–</span>
        )}
        <span className="text-quiet ml-1.5 text-sm">%</span>
      </Cell>
      <Cell name={`Within ${bandWords(band)}`} hint="uncertainty">
        {judgement && meter ? (
          <span>
            <span className="font-semibold sm:text-lg">{certaintyWords[judgement.certainty]}</span>
            <span className="figures ml-2 font-bold whitespace-nowrap sm:text-lg">±{judgement.uncertaintyPercent.toFixed(1)}</span>
            <span className="text-quiet ml-1 text-sm">%</span>
          </span>
        ) : (
          <span className="text-quiet">{judgement ? 'needs a meter' : '–'}</span>
        )}
      </Cell>
    </output>
  );
}

const Cell = ({ name, hint, children }: { name: string; hint?: string; children: ReactNode }) => (
  <span className="block min-w-0 px-2.5 pt-2 pb-2 not-first:border-l sm:px-4">
    <span className="text-quiet block truncate text-sm">
      {name}
      {hint && <span className="max-sm:sr-only">, {hint}</span>}
    </span>
    <span className="flex min-h-9 flex-wrap items-baseline">{children}</span>
  </span>
);
