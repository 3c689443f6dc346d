import { kvAtSetting } from '@/lib/hydraulics/links/balancing-valve';
import { fluidProperties } from '@/lib/hydraulics/fluids';
import type { BalancingValveLink, NetworkDocument } from '@/lib/hydraulics/types';
import { flowThroughValveLs } from '@/lib/hydraulics/valve-coefficient';
import { type LoopReading, type LoopSettings, settingIn } from './readings';

/** What happened on site, in order. */
export type SiteEvent = { kind: 'reading'; reading: LoopReading } | { kind: 'set'; link: string; setting: number };

/** A flow as measured: at which event, at which valve setting, and after how many changes of the loop. */
export interface MeasuredFlow {
  event: number;
  /** Settings changed before it, anywhere. Readings of one stand can be compared. */
  stand: number;
  setting: number;
  kv: number;
  flowLs: number;
  dropKpa: number;
}

/** The measured flows of each valve, oldest first, and how the loop stands now. */
export interface MeasuredLoop {
  flows: Map<string, MeasuredFlow[]>;
  /** Events at which each valve was set. */
  sets: Map<string, number[]>;
  settings: LoopSettings;
  stand: number;
  /** Stand after each event. */
  standAfter: number[];
}

/** Replays what happened; flows of balancing valves follow from their charts, a reading elsewhere is not used. */
export function measuredLoop(document: NetworkDocument, events: SiteEvent[]): MeasuredLoop {
  const fluid = fluidProperties(document.fluid);
  if (!fluid.ok) throw new RangeError(fluid.error.message);
  const density = fluid.properties.densityKgM3;
  const valves = new Map(document.links.flatMap((link) => (link.kind === 'balancingValve' ? [[link.id, link] as const] : [])));
  const loop: MeasuredLoop = { flows: new Map(), sets: new Map(), settings: {}, stand: 0, standAfter: [] };
  events.forEach((event, at) => {
    if (event.kind === 'set') {
      loop.stand++;
      loop.settings[event.link] = event.setting;
      loop.standAfter.push(loop.stand);
      push(loop.sets, event.link, at);
      return;
    }
    loop.standAfter.push(loop.stand);
    const valve = valves.get(event.reading.link);
    if (valve) push(loop.flows, valve.id, { event: at, stand: loop.stand, ...flowRead(valve, loop.settings, event.reading, density) });
  });
  return loop;
}

function flowRead(valve: BalancingValveLink, settings: LoopSettings, { quantity, value }: LoopReading, density: number) {
  const setting = settingIn(settings, valve);
  const kv = kvAtSetting(valve.kvTable, setting);
  const flowLs = quantity === 'flowLs' ? value : flowThroughValveLs(kv, value, density);
  const ratio = flowLs / flowThroughValveLs(kv, 1, density);
  return { setting, kv, flowLs, dropKpa: quantity === 'dropKpa' ? value : ratio * Math.abs(ratio) };
}

function push<T>(map: Map<string, T[]>, key: string, value: T): void {
  const list = map.get(key);
  if (list) list.push(value);
  else map.set(key, [value]);
}
