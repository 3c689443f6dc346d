'use client';

import type { ProportionalAdvice, ProportionalStep } from '@/lib/balancing/proportional';
import { Button, buttonClass } from '../../ui/button';
import { Figure } from '../../ui/figure';
import { Notice } from '../../ui/notice';
import { Sheet } from '../../ui/sheet';
import { placeOf, type Commissioning } from '../commissioning-context';
import { PlaceLink } from '../place-link';
import { ProportionalRatios } from './proportional-ratios';
import { settingWords } from './setting-words';
import { stationFinder } from './station-finder';
import { useRecordSetting } from './use-record-setting';

/** The published procedure, led one step at a time; whatever is done instead, it goes on from what was measured. */
export function ProportionalView({ commissioning, advice }: { commissioning: Commissioning; advice: ProportionalAdvice }) {
  const stationOf = stationFinder(commissioning);
  const named = (text: string) => text.replace(/[\w-]+(?::balancing)?/g, (word) => stationOf(word)?.tag ?? word);
  const lookInto = advice.lookInto.map((link) => stationOf(link)?.tag ?? link);
  return (
    <div className="flex flex-col gap-4">
      <StepSheet commissioning={commissioning} step={advice.step} why={named(advice.step.why)} />
      {lookInto.length > 0 && (
        <Notice tone="brass" title={`Find out why first: ${lookInto.join(', ')}`}>
          Too low to be a reference or too high to be believed beside the others of their branch. They are left out of it meanwhile.
        </Notice>
      )}
      <ProportionalRatios commissioning={commissioning} />
      <p className="text-quiet max-w-3xl text-sm">
        Branch by branch the terminal with the lowest ratio of measured to design flow stays open as the reference, and every other is
        throttled to its ratio; then the branches of a riser, the risers, and the pump last. Equal ratios stay equal when the flow above
        them changes. Any step may be done out of order.
      </p>
    </div>
  );
}

function StepSheet({ commissioning, step, why }: { commissioning: Commissioning; step: ProportionalStep; why: string }) {
  const { base, round, mayRecord, site, standing } = commissioning;
  const record = useRecordSetting(commissioning);
  if (step.kind === 'done') return <Notice title="The procedure is complete">{why}</Notice>;
  const station = stationFinder(commissioning)(step.link);
  if (!station) return <Notice tone="high">{why}</Notice>;
  const isPump = step.kind === 'set-pump';
  const to = step.kind === 'set-valve' ? step.setting : isPump ? step.speed : null;
  const before =
    site.settingChanges.findLast(({ stationId }) => stationId === station.id)?.after ?? standing.get(station.id)?.settingTurns ?? null;
  return (
    <Sheet title={step.kind === 'read' ? 'Read' : isPump ? 'Set the pump' : 'Set the valve'}>
      <div className="flex flex-wrap items-end justify-between gap-4">
        <div>
          <p className="text-[2rem] leading-tight font-bold">{station.tag}</p>
          <p className="text-quiet text-lg">{placeOf(station)}</p>
        </div>
        {to !== null && (
          <p className="text-right">
            <span className="text-quiet text-sm">to</span>{' '}
            <span className="figures text-brass text-3xl font-bold">{settingWords(isPump ? 'pump' : 'balancingValve', to)}</span>
          </p>
        )}
      </div>
      {step.kind === 'set-valve' && (
        <p className="mt-2 text-lg">
          Its ratio goes from <span className="figures">{step.ratioPercent.toFixed(1)} %</span> to{' '}
          <strong className="figures">{step.targetRatioPercent.toFixed(1)} %</strong>:{' '}
          <Figure quantity="flow" si={step.targetFlowLs} hasUnit className="font-bold" />, and the meter then shows{' '}
          <Figure quantity="pressure" si={step.targetDropKpa} hasUnit className="font-bold" />.
        </p>
      )}
      <p className="text-quiet mt-2">{why}</p>
      <div className="mt-4 flex flex-wrap gap-2">
        <PlaceLink
          href={`${base}/stations/${station.id}`}
          className={`${buttonClass(step.kind === 'read' ? 'primary' : 'secondary', 'touch')} no-underline`}
        >
          Open {station.tag}
        </PlaceLink>
        {to !== null && mayRecord && round && (
          <Button size="touch" look="primary" onClick={() => void record(station, before, to)}>
            It is set
          </Button>
        )}
      </div>
      {mayRecord && !round && <p className="text-quiet mt-3 text-sm">No round is open: start one on the list of stations to enter this.</p>}
    </Sheet>
  );
}
