'use client';

import { useState } from 'react';
import { Notice } from '../../ui/notice';
import { Button } from '../../ui/button';
import { CautionsBox } from '../cautions-box';
import type { Commissioning } from '../commissioning-context';
import { PredictedView } from './predicted-view';
import { ProportionalView } from './proportional-view';
import { usePlan } from './use-plan';

const ways = {
  predicted: 'Predicted settings',
  proportional: 'Proportional, step by step',
} as const;
type Way = keyof typeof ways;

/** What to do next and why: all settings at once from the fitted loop, or the published procedure one step at a time. */
export function NextPage({ commissioning }: { commissioning: Commissioning }) {
  const [way, setWay] = useState<Way>('predicted');
  const { data: plan, error, isFetching } = usePlan(commissioning);
  return (
    <main className="mx-auto flex w-full max-w-6xl flex-1 flex-col gap-4 p-4 lg:py-6">
      <div className="flex flex-wrap items-end justify-between gap-3">
        <h1>What to do next</h1>
        <div role="group" aria-label="Procedure" className="flex flex-wrap gap-2">
          {(Object.keys(ways) as Way[]).map((each) => (
            <Button
              key={each}
              size="touch"
              look={each === way ? 'primary' : 'secondary'}
              aria-pressed={each === way}
              className="!text-base"
              onClick={() => setWay(each)}
            >
              {ways[each]}
            </Button>
          ))}
        </div>
      </div>
      {commissioning.mayRecord && <CautionsBox />}
      {error && (
        <Notice tone="high" title="The plan could not be made">
          {error.message}
        </Notice>
      )}
      {!plan && !error && <Notice>Working it out on this device…</Notice>}
      {plan && (
        <div aria-busy={isFetching} className={isFetching ? 'opacity-60' : undefined}>
          {way === 'predicted' ? (
            <PredictedView commissioning={commissioning} predicted={plan.predicted} />
          ) : (
            <ProportionalView commissioning={commissioning} advice={plan.proportional} />
          )}
        </div>
      )}
    </main>
  );
}
