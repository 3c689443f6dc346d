import { describe, expect, it } from 'vitest';
import { nextProportionalStep, type ProportionalStep } from '@/lib/balancing/proportional';
import type { SiteEvent } from '@/lib/balancing/proportional-log';
import { documentAt } from '@/lib/balancing/readings';
import { solve } from '@/lib/hydraulics/solve';
import { threeTerminals } from '../../make/three-terminals';

const document = threeTerminals();
const settingsAfter = (events: SiteEvent[]) =>
  Object.fromEntries(events.flatMap((event) => (event.kind === 'set' ? [[event.link, event.setting]] : [])));
const flowsAfter = (events: SiteEvent[]) =>
  new Map(solve(documentAt(document, settingsAfter(events))).links.map((link) => [link.id, link]));
const readExactly = (events: SiteEvent[], link: string): SiteEvent => ({
  kind: 'reading',
  reading: { link, quantity: 'dropKpa', value: flowsAfter(events).get(link)!.dropKpa, meter: 'exact' },
});

function lead(criterion: number) {
  const events: SiteEvent[] = [];
  const steps: ProportionalStep[] = [];
  for (let k = 0; k < 200; k++) {
    const { step } = nextProportionalStep({ document, events, criterion, tolerance: 0.01 });
    steps.push(step);
    if (step.kind === 'done') return { events, steps };
    if (step.kind === 'read') events.push(readExactly(events, step.link));
    else if (step.kind === 'set-valve') events.push({ kind: 'set', link: step.link, setting: step.setting });
    else events.push({ kind: 'set', link: step.link, setting: step.speed });
  }
  throw new Error('the procedure has not ended');
}

describe('the proportional procedure on three terminals (case N11)', () => {
  it('throttles T2 to Kv 3.4153 and then T1 to 4.6476, against the reference T3, and all reach design flow', () => {
    const { events, steps } = lead(1e-4);
    const set = steps.filter((step) => step.kind === 'set-valve');
    expect(new Set(set.map((step) => step.reference))).toEqual(new Set(['V3']));
    expect([...new Set(set.map((step) => step.link))]).toEqual(['V2', 'V1']);
    const settings = settingsAfter(events);
    expect(settings.V2).toBeCloseTo(3.4153, 2);
    expect(settings.V1).toBeCloseTo(4.6476, 2);
    const flows = flowsAfter(events);
    expect(flows.get('T1')!.flowLs / 0.5).toBeCloseTo(1, 2);
    expect(flows.get('T2')!.flowLs / 0.3).toBeCloseTo(1, 2);
    expect(flows.get('T3')!.flowLs / 0.2).toBeCloseTo(1, 2);
  });

  it('tells the ratio to throttle to and the drop that the meter will then show', () => {
    const { events, steps } = lead(1e-4);
    const last = steps.filter((step) => step.kind === 'set-valve').at(-1)!;
    expect(last.link).toBe('V1');
    expect(last.targetRatioPercent).toBeCloseTo(100, 0);
    expect(last.targetDropKpa).toBeCloseTo(flowsAfter(events).get('V1')!.dropKpa, 0);
  });

  it('throttles nothing where all ratios count as equal', () => {
    const { steps } = lead(0.5);
    expect(steps.filter((step) => step.kind === 'set-valve' && step.reference !== null)).toEqual([]);
  });

  it('plans again when a valve was changed out of turn', () => {
    const events: SiteEvent[] = [];
    for (const link of ['V1', 'V2', 'V3']) events.push(readExactly(events, link));
    events.push({ kind: 'set', link: 'V1', setting: 5 });
    const { step } = nextProportionalStep({ document, events });
    expect(step.kind).toBe('read');
  });

  it('does not take a terminal without flow for the reference', () => {
    const events: SiteEvent[] = ['V1', 'V2', 'V3'].map((link) => ({
      kind: 'reading',
      reading: { link, quantity: 'flowLs', value: { V1: 0.56, V2: 0.004, V3: 0.22 }[link]!, meter: 'exact' },
    }));
    const { step, lookInto } = nextProportionalStep({ document, events });
    expect(lookInto).toEqual(['V2']);
    expect(step.kind === 'set-valve' ? step.reference : step.kind).not.toBe('V2');
  });
});
