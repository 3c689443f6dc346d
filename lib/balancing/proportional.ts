import type { NetworkDocument } from '@/lib/hydraulics/types';
import { dropAcrossValveKpa } from '@/lib/hydraulics/valve-coefficient';
import type { Station } from './hierarchy';
import { type ProportionalDesign, proportionalDesign } from './proportional-design';
import { type MeasuredGroup, measureGroup, ratioOf } from './proportional-groups';
import { measuredLoop, type MeasuredLoop, type SiteEvent } from './proportional-log';
import { settingIn } from './readings';
import { kvByRest, kvBySecant, settingForKv } from './throttle-target';

export interface ProportionalState {
  document: NetworkDocument;
  /** Readings and settings so far, in order; the valves stand as in the document before the first. */
  events: SiteEvent[];
  /** Ratios of a group count as equal within this part (default 0.05). */
  criterion?: number;
  /** The last scan asks for design flow within this part (default 0.05). */
  tolerance?: number;
}

export type ProportionalStep =
  | { kind: 'read'; link: string; why: string }
  | {
      kind: 'set-valve';
      link: string;
      reference: string | null;
      ratioPercent: number;
      targetRatioPercent: number;
      targetFlowLs: number;
      setting: number;
      targetDropKpa: number;
      why: string;
    }
  | { kind: 'set-pump'; link: string; speed: number; ratioPercent: number; why: string }
  | { kind: 'done'; why: string };

export interface ProportionalAdvice {
  step: ProportionalStep;
  /** Valves of terminals that are too low to be a reference, or too high to be believed: find out why. */
  lookInto: string[];
}

const START_TOTAL = 1.1;
const MOST_TRIMS = 3;
const USUAL_PART = 0.05;

/**
 * The next step of the published proportional procedure and why: total flow to about 110 %, a first scan, then branch by branch (the highest ratio first) every
 * terminal throttled to the reference, the one with the lowest ratio, which is read again each time; then branches in risers, risers on mains, the pump, and a
 * last scan. Only what was measured counts, so that steps may be done in any order.
 */
export function nextProportionalStep(state: ProportionalState): ProportionalAdvice {
  const procedure = new Procedure(state);
  return { step: procedure.next(), lookInto: procedure.lookInto() };
}

class Procedure {
  private readonly design: ProportionalDesign;
  private readonly criterion: number;
  private readonly tolerance: number;
  private readonly named = new Set<string>();

  constructor(private readonly state: ProportionalState) {
    this.design = proportionalDesign(state.document);
    this.criterion = state.criterion ?? USUAL_PART;
    this.tolerance = state.tolerance ?? USUAL_PART;
  }

  lookInto(): string[] {
    return [...this.named];
  }

  next(): ProportionalStep {
    const { events } = this.state;
    const loop = measuredLoop(this.state.document, events);
    const trimmed = this.trimmedAt(events);
    return this.startStep(loop) ?? (trimmed === null ? this.groupStep(loop) : this.lastScan(loop, trimmed));
  }

  /** Total flow first, so that nothing is measured far above design; then every station once. */
  private startStep(loop: MeasuredLoop): ProportionalStep | null {
    const { main, pump, groups, hierarchy } = this.design;
    const firstMain = main && loop.flows.get(main.link)?.[0];
    if (main && !firstMain) return { kind: 'read', link: main.link, why: 'The total flow comes first.' };
    if (main && firstMain && pump && !loop.sets.size) {
      const ratio = firstMain.flowLs / main.designFlowLs;
      const speed = (this.speedNow(loop, pump) * START_TOTAL) / ratio;
      if (ratio > START_TOTAL)
        return {
          kind: 'set-pump',
          link: pump,
          speed,
          ratioPercent: 100 * ratio,
          why: `The total is ${percent(ratio)} of design: slow the pump to about 110 %.`,
        };
    }
    const grouped = new Set(groups.flatMap((group) => group.members.map((member) => member.link)));
    const unread = [...hierarchy.stations.values()].find((station) => grouped.has(station.link) && !loop.flows.has(station.link));
    return unread ? { kind: 'read', link: unread.link, why: 'The first scan: every station once, with nothing changed in between.' } : null;
  }

  /** The event at which the pump was trimmed with all groups done, the last such; null before that. */
  private trimmedAt(events: SiteEvent[]): number | null {
    const { pump } = this.design;
    for (let at = events.length - 1; at >= 0; at--) {
      const event = events[at];
      if (event.kind !== 'set' || event.link !== pump) continue;
      const before = measuredLoop(this.state.document, events.slice(0, at));
      if (this.openGroup(before) === 'all-done') return at;
    }
    return null;
  }

  private groupStep(loop: MeasuredLoop): ProportionalStep {
    const group = this.openGroup(loop);
    if (group === 'all-done') return this.pumpStep(loop);
    if (group.unread)
      return {
        kind: 'read',
        link: group.unread.link,
        why: `Below ${group.station.link} all is done: read its members again before they are compared.`,
      };
    const { station: member, unread, pairs } = group.next!;
    const reference = group.reference!;
    if (unread)
      return {
        kind: 'read',
        link: unread.link,
        why:
          unread === reference
            ? `${reference.link} is the reference; it moves with every change, so it is read again.`
            : `Read what ${member.link} now takes.`,
      };
    const { flowLs } = loop.flows.get(reference.link)!.at(-1)!;
    const { quotient } = pairs[pairs.length - 1];
    const target = flowLs / reference.designFlowLs;
    const why = `${member.link} is at ${percent(target * quotient)}, the reference ${reference.link} at ${percent(target)}: ${quotient > 1 ? 'throttle' : 'open'} it to the same.`;
    return this.setStep(loop, member, reference.link, target * quotient, target, pairs, why);
  }

  /** The group to work on: those with nothing to do below, the highest ratio first; or that all are done. */
  private openGroup(loop: MeasuredLoop): MeasuredGroup | 'all-done' {
    const { groups } = this.design;
    const excused = new Map<string, number>();
    const done = new Set<Station>();
    const rank = (group: Station) => group.members.reduce((most, member) => Math.max(most, depth(member)), 0);
    const measuredRatio = (group: Station) => {
      const flow = loop.flows.get(group.link)?.[0];
      return flow ? flow.flowLs / group.designFlowLs : 0;
    };
    const ordered = [...groups].sort((a, b) => rank(a) - rank(b) || measuredRatio(b) - measuredRatio(a));
    for (const group of ordered) {
      const measured = measureGroup(group, loop, excused, this.criterion);
      for (const each of [...measured.setAside, ...measured.doubted]) this.named.add(each.link);
      for (const each of measured.setAside) {
        const flow = loop.flows.get(each.link)!.at(-1)!;
        for (const terminal of each.terminals) excused.set(terminal, Math.max(each.designFlowLs - flow.flowLs, 0));
      }
      this.excused = excused;
      const next = this.settable(measured, loop);
      if (next.unread || next.next) return next;
      done.add(group);
    }
    return 'all-done';
  }

  private excused: ReadonlyMap<string, number> = new Map();

  /** A member that would have to open further than it can, or by less than its scale shows, is as near as it gets. */
  private settable(group: MeasuredGroup, loop: MeasuredLoop): MeasuredGroup {
    let measured = group;
    const skipped: Station[] = [];
    while (measured.next && !measured.next.unread) {
      const { station, pairs } = measured.next;
      const { setting } = this.targetFor(loop, station, pairs);
      if (setting !== settingIn(loop.settings, this.design.valves.get(station.link)!)) return measured;
      skipped.push(station);
      const rest = { ...group.station, members: group.station.members.filter((member) => !skipped.includes(member)) };
      if (rest.members.length < 2) return { ...measured, next: null };
      measured = { ...measureGroup(rest, loop, this.excused, this.criterion), setAside: group.setAside, doubted: group.doubted };
    }
    return measured;
  }

  private targetFor(loop: MeasuredLoop, station: Station, pairs: { kv: number; quotient: number }[]) {
    const valve = this.design.valves.get(station.link)!;
    const flow = loop.flows.get(station.link)!.at(-1)!;
    const rest =
      station.behind.reduce((sum, link) => sum + (this.design.drops.get(link) ?? 0), 0) * (flow.flowLs / station.designFlowLs) ** 2;
    const byRest = kvByRest(flow.kv, flow.dropKpa, rest, 1 / pairs[pairs.length - 1].quotient);
    return settingForKv(valve, kvBySecant(pairs) ?? byRest);
  }

  private setStep(
    loop: MeasuredLoop,
    station: Station,
    reference: string | null,
    ratio: number,
    target: number,
    pairs: { kv: number; quotient: number }[],
    why: string,
  ): ProportionalStep {
    const { setting, kv } = this.targetFor(loop, station, pairs);
    const targetFlowLs = target * station.designFlowLs;
    return {
      kind: 'set-valve',
      link: station.link,
      reference,
      ratioPercent: 100 * ratio,
      targetRatioPercent: 100 * target,
      targetFlowLs,
      setting,
      targetDropKpa: dropAcrossValveKpa(kv, targetFlowLs, this.design.densityKgM3),
      why,
    };
  }

  private pumpStep(loop: MeasuredLoop): ProportionalStep {
    const { pump, main, leaves } = this.design;
    if (!pump) return { kind: 'done', why: 'All ratios are equal, and the document has no pump to trim.' };
    const stations = main ? [main] : leaves;
    const unread = stations.find((station) => loop.flows.get(station.link)?.at(-1)?.stand !== loop.stand);
    if (unread) return { kind: 'read', link: unread.link, why: 'All ratios are equal: the total tells what the pump has to give.' };
    const ratios = stations.map((station) => ratioOf(station, loop.flows.get(station.link)!.at(-1)!, this.excused));
    const ratio = ratios.reduce((sum, each) => sum + each, 0) / ratios.length;
    const speed = Math.min(this.speedNow(loop, pump) / ratio, Math.max(1, this.speedNow(loop, pump)));
    return {
      kind: 'set-pump',
      link: pump,
      speed,
      ratioPercent: 100 * ratio,
      why: `All ratios are equal and the total is ${percent(ratio)} of design: bring it to 100 % with the pump.`,
    };
  }

  /** Every terminal once more; what is still outside tolerance is set to its design flow by itself. */
  private lastScan(loop: MeasuredLoop, trimmed: number): ProportionalStep {
    // Names those that were set aside.
    this.openGroup(measuredLoop(this.state.document, this.state.events.slice(0, trimmed)));
    const leaves = this.design.leaves;
    const isAside = (leaf: Station) => leaf.terminals.every((terminal) => this.excused.has(terminal));
    const after = (leaf: Station) => (loop.flows.get(leaf.link) ?? []).filter((flow) => flow.event > trimmed);
    for (const leaf of leaves) {
      const flows = after(leaf);
      const sets = (loop.sets.get(leaf.link) ?? []).filter((event) => event > trimmed);
      if (!flows.length || (sets.at(-1) ?? -1) > flows.at(-1)!.event)
        return {
          kind: 'read',
          link: leaf.link,
          why: flows.length ? 'Read what it now takes.' : 'The last scan: every terminal as it is left.',
        };
    }
    for (const leaf of leaves) {
      const flows = after(leaf);
      const sets = (loop.sets.get(leaf.link) ?? []).filter((event) => event > trimmed);
      const pairs = flows.map((flow) => ({ kv: flow.kv, quotient: flow.flowLs / leaf.designFlowLs }));
      const ratio = pairs[pairs.length - 1].quotient;
      if (isAside(leaf) || sets.length >= MOST_TRIMS || Math.abs(ratio - 1) <= this.tolerance || ratio <= 0) continue;
      const step = this.setStep(
        loop,
        leaf,
        null,
        ratio,
        1,
        pairs,
        `${leaf.link} is at ${percent(ratio)} of design after the last scan: set it to 100 %.`,
      );
      if (step.kind === 'set-valve' && step.setting !== settingIn(loop.settings, this.design.valves.get(leaf.link)!)) return step;
    }
    return { kind: 'done', why: 'The last scan is complete: every terminal that can be is within tolerance.' };
  }

  private speedNow(loop: MeasuredLoop, pump: string): number {
    const link = this.state.document.links.find((each) => each.id === pump);
    return loop.settings[pump] ?? (link?.kind === 'pump' ? link.speed : undefined) ?? 1;
  }
}

const depth = (station: Station): number => station.members.reduce((most, member) => Math.max(most, 1 + depth(member)), 0);
const percent = (ratio: number) => `${(100 * ratio).toFixed(1)} %`;
