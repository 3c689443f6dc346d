import type { NetworkDocument } from '@/lib/hydraulics/types';
import type { LoopReading } from '@/lib/balancing/readings';
import { valveOf, type VirtualSite } from '../site/virtual-site';

/** A technician at a virtual site: passes on what is asked for and counts it. */
export class CountedSite {
  readonly readings: string[] = [];
  /** Changes of balancing valves; what is done at one valve without leaving it is one. */
  readonly changes: string[] = [];
  private at = '';

  constructor(private readonly site: VirtualSite) {}

  read(station: string): LoopReading {
    this.readings.push(station);
    if (station !== this.at) this.at = '';
    return this.site.read(station);
  }

  set(id: string, setting: number): number {
    if (this.at !== id) this.changes.push(id);
    this.at = id;
    return this.site.set(id, setting);
  }
}

export interface VisitRow {
  procedure: 'proportional' | 'predicted';
  terminals: number;
  seed: number;
  /** Readings taken at terminals, and at all stations, over their number. */
  readingsPerTerminal: number;
  readingsPerStation: number;
  changesPerValve: number;
  /** Per cent of the terminals without a fault of their own that truly have their flow. */
  within5: number;
  within10: number;
  /** Per cent of the injected faults named at the right place, and places named without one. */
  faultsFound: number;
  falseAlarms: number;
  seconds: number;
}

/** What a visit came to. `named` are the places (valves) that the procedure told the technician to look into. */
export function visitRow(
  procedure: VisitRow['procedure'],
  document: NetworkDocument,
  seed: number,
  site: VirtualSite,
  counted: CountedSite,
  named: Set<string>,
  seconds: number,
): VisitRow {
  const valves = document.links.filter((link) => link.kind === 'balancingValve').map((link) => link.id);
  const terminals = document.links.filter((link) => link.kind === 'terminal').map((link) => link.id);
  const ofTerminals = new Set(terminals.map(valveOf));
  // A shut or blocked branch or an unknown valve forbids the flow; a valve that was only set wrongly does not.
  const forbidden = new Set(site.faults.flatMap((fault) => (fault.cause === 'mis-set' ? [] : [fault.terminal])));
  const errors = [...site.trueRatios()].flatMap(([id, ratio]) => (forbidden.has(id) ? [] : [Math.abs(ratio - 1)]));
  const share = (limit: number) => (100 * errors.filter((error) => error <= limit).length) / errors.length;
  const faulty = new Set(site.faults.map((fault) => fault.valve));
  const found = [...faulty].filter((valve) => named.has(valve)).length;
  return {
    procedure,
    terminals: terminals.length,
    seed,
    readingsPerTerminal: counted.readings.filter((station) => ofTerminals.has(station)).length / terminals.length,
    readingsPerStation: counted.readings.length / (valves.length + 1),
    changesPerValve: counted.changes.filter((id) => id !== 'PU').length / valves.length,
    within5: share(0.05),
    within10: share(0.1),
    faultsFound: faulty.size ? (100 * found) / faulty.size : 100,
    falseAlarms: [...named].filter((valve) => !faulty.has(valve)).length,
    seconds,
  };
}
