import { kvAtSetting, largestSetting } from '@/lib/hydraulics/links/balancing-valve';
import { changeLinks, prepareNetwork, type PreparedNetwork } from '@/lib/hydraulics/prepare';
import { solvePrepared } from '@/lib/hydraulics/solve';
import type { LinkOf, NetworkDocument, NetworkLink } from '@/lib/hydraulics/types';
import type { LoopReading } from '@/lib/balancing/readings';
import { scaled } from '@/lib/balancing/fit/fitted-document';
import { genericValves } from '@/lib/network/valve-families';
import type { SeededRandom } from './seeded-random';

/** How far a building differs from its design, and how well it can be measured; standard deviations of logarithms, or parts of the flow. */
export interface SiteModel {
  branch: number;
  main: number;
  meterRandom: number;
  meterBias: number;
  meterAbsoluteKpa: number;
  settingStep: number;
  speedStep: number;
  hasFaults: boolean;
}

export const statedSite: SiteModel = {
  branch: 0.3,
  main: 0.15,
  meterRandom: 0.015,
  meterBias: 0.01,
  meterAbsoluteKpa: 0.1,
  settingStep: 0.1,
  speedStep: 0.002,
  hasFaults: true,
};

export type SiteFault = { cause: 'blocked' | 'shut' | 'mis-set' | 'wrong-chart'; terminal: string; valve: string };

/** Blocked strainers, shut valves, mis-set valves; one wrong chart besides. */
const faultCounts: Record<number, [blocked: number, shut: number, misSet: number]> = { 12: [1, 0, 1], 60: [2, 1, 2], 200: [4, 2, 4] };

/**
 * A building as built, of which a technician sees only what `read` and `set` answer. Terminals are read with one meter, branches, mains and pump with
 * another; each has its own bias. Deterministic from its random numbers.
 */
export class VirtualSite {
  readonly faults: SiteFault[] = [];
  private readonly built: PreparedNetwork;
  private readonly bias: Record<string, number>;
  private readonly terminalValves: Set<string>;

  constructor(
    private readonly design: NetworkDocument,
    private readonly random: SeededRandom,
    private readonly model: SiteModel = statedSite,
  ) {
    this.bias = { handheld: model.meterBias * random.normal(), trolley: model.meterBias * random.normal() };
    this.terminalValves = new Set(design.links.flatMap((link) => (link.kind === 'terminal' ? [valveOf(link.id)] : [])));
    const places = design.links.flatMap((link) => (link.kind === 'terminal' ? [link.id.slice(1)] : []));
    const runFactor = new Map(places.map((place) => [place, Math.exp(model.branch * random.normal())]));
    let links = design.links.map((link): NetworkLink => {
      const place = /^(strainer|T|control)(.+)$/.exec(link.id)?.[2];
      if (place) return scaled(link, runFactor.get(place)!);
      if (link.kind === 'pipe' || link.kind === 'resistance') return scaled(link, Math.exp(model.main * random.normal()));
      return link;
    });
    if (model.hasFaults) links = this.withFaults(links, places);
    this.built = prepareNetwork({ ...design, links });
  }

  private withFaults(links: NetworkLink[], places: string[]): NetworkLink[] {
    const { random, faults } = this;
    const free = places.slice();
    const changed = new Map(links.map((link) => [link.id, link]));
    const [blocked, shut, misSet] = faultCounts[places.length];
    const put = (cause: SiteFault['cause']) => {
      const place = random.take(free);
      faults.push({ cause, terminal: `T${place}`, valve: `V${place}` });
      return place;
    };
    for (let k = 0; k < blocked; k++) {
      const id = `strainer${put('blocked')}`;
      changed.set(id, scaled(changed.get(id)!, random.between(40, 150)));
    }
    for (let k = 0; k < shut; k++) {
      const id = `strainer${put('shut')}`;
      changed.set(id, { ...changed.get(id)!, closed: true });
    }
    for (let k = 0; k < misSet; k++) {
      const valve = changed.get(`V${put('mis-set')}`) as LinkOf<'balancingValve'>;
      changed.set(valve.id, { ...valve, setting: Number(random.between(0.8, 1.8).toFixed(1)) });
    }
    const valve = changed.get(`V${put('wrong-chart')}`) as LinkOf<'balancingValve'>;
    const size = genericValves.findIndex((each) => each.kvTable === valve.kvTable);
    const other = size === 0 || random.uniform() < 0.5 ? size + 1 : size - 1;
    changed.set(valve.id, { ...valve, kvTable: genericValves[other].kvTable });
    return links.map((link) => changed.get(link.id)!);
  }

  /** Differential pressure at a balancing valve, or what a pump raises, kPa, as the meter shows it. */
  read(station: string): LoopReading {
    const meter = this.terminalValves.has(station) ? 'handheld' : 'trolley';
    const { meterRandom, meterAbsoluteKpa } = this.model;
    const drop = Math.abs(this.solved().links.find((link) => link.id === station)!.dropKpa);
    const isThere = Math.abs(this.flowAt(station)) > 0;
    const seen =
      (isThere ? drop : 0) * ((1 + this.bias[meter]) * (1 + meterRandom * this.random.normal())) ** 2 +
      meterAbsoluteKpa * this.random.normal();
    return { link: station, quantity: 'dropKpa', value: seen, meter, flowRelative: meterRandom, absolute: meterAbsoluteKpa };
  }

  /** Sets a valve (turns) or the pump (speed ratio) as finely as its scale allows; answers where it now stands. */
  set(id: string, setting: number): number {
    const link = this.built.document.links.find((each) => each.id === id)!;
    this.solution = null;
    if (link.kind === 'pump') {
      const speed = Math.min(1, toStep(setting, this.model.speedStep));
      changeLinks(this.built, [{ ...link, speed }]);
      return speed;
    }
    if (link.kind !== 'balancingValve') throw new RangeError(`${id} cannot be set`);
    const stands = Math.min(Math.max(toStep(setting, this.model.settingStep), link.kvTable[0].setting), largestSetting(link.kvTable));
    changeLinks(this.built, [{ ...link, setting: stands }]);
    return stands;
  }

  /** Ratio of true flow to design of each terminal by id: what the judge of a method may see, never the method. */
  trueRatios(): Map<string, number> {
    const flows = new Map(this.solved().links.map((link) => [link.id, link.flowLs]));
    return new Map(
      this.design.links.flatMap((link) => (link.kind === 'terminal' ? [[link.id, flows.get(link.id)! / link.designFlowLs] as const] : [])),
    );
  }

  private solution: ReturnType<typeof solvePrepared> | null = null;
  private flows: Float64Array | undefined;

  private solved() {
    if (!this.solution) {
      this.solution = solvePrepared(this.built, { startFlows: this.flows });
      if (!this.solution.converged) throw new Error('the virtual building has no steady flow');
      this.flows = Float64Array.from(this.built.position, (at) => this.solution!.links[at].flowLs);
    }
    return this.solution;
  }

  private flowAt(id: string): number {
    return this.solved().links.find((link) => link.id === id)!.flowLs;
  }
}

export const valveOf = (terminal: string) => `V${terminal.slice(1)}`;
const toStep = (setting: number, step: number) => Number((Math.round(setting / step) * step).toPrecision(12));

/** Kv that the chart gives at a setting: what a technician reads off. */
export function chartKv(design: NetworkDocument, valve: string, setting: number): number {
  const link = design.links.find((each) => each.id === valve);
  if (link?.kind !== 'balancingValve') throw new RangeError(`${valve} has no chart`);
  return kvAtSetting(link.kvTable, setting);
}
