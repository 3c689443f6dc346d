import type { Station } from './hierarchy';
import type { MeasuredFlow, MeasuredLoop } from './proportional-log';

/** Below this part of the middle of its branch a terminal is looked into before it may hold the others back; above the other, its reading is doubted. */
const TOO_LOW = 0.6;
const TOO_HIGH = 2.5;
const MOST_SETS = 4;

/** A branch, riser or main as measured. */
export interface MeasuredGroup {
  station: Station;
  /** Member that has not been read as it should be, the nearest first to be read. */
  unread: Station | null;
  reference: Station | null;
  setAside: Station[];
  doubted: Station[];
  /** The next member that does not stand as the reference does. */
  next: MeasuredMember | null;
}

export interface MeasuredMember {
  station: Station;
  /** Pairs of readings of it and the reference at one stand: its Kv, and its ratio over the reference's. */
  pairs: { kv: number; quotient: number }[];
  /** What must be read before it can be set. */
  unread: Station | null;
}

/** Part of design flow. Of a station above the terminals that are set aside, as much design flow counts as the others have. */
export function ratioOf(station: Station, flow: MeasuredFlow, excused: ReadonlyMap<string, number>): number {
  const missing = station.terminals.reduce((sum, terminal) => sum + (excused.get(terminal) ?? 0), 0);
  return flow.flowLs / Math.max(station.designFlowLs - missing, 1e-9);
}

/** How a group stands: its reference is the member with the lowest ratio, the others are compared far to near. */
export function measureGroup(station: Station, loop: MeasuredLoop, excused: ReadonlyMap<string, number>, criterion: number): MeasuredGroup {
  const { members } = station;
  const none = { station, reference: null, setAside: [], doubted: [], next: null };
  const since = lastSetBelow(members, loop);
  const flowsOf = (member: Station) => loop.flows.get(member.link) ?? [];
  const stands = flowsOf(members[0]).map((flow) => flow.stand);
  const base = stands
    .reverse()
    .find((stand) => stand >= since && members.every((member) => flowsOf(member).some((flow) => flow.stand === stand)));
  if (base === undefined) {
    const unread = members.find((member) => !flowsOf(member).some((flow) => flow.stand === loop.stand)) ?? null;
    return { ...none, unread };
  }
  const ratioAt = (member: Station, stand: number) => {
    const flow = flowsOf(member).findLast((each) => each.stand === stand);
    return flow && ratioOf(member, flow, excused);
  };
  const first = firstCommonStand(members, loop, since)!;
  const ratios = members.map((member) => ratioAt(member, first)!);
  const middle = ratios.slice().sort((a, b) => a - b)[members.length >> 1];
  const isLeaf = (member: Station) => member.members.length === 0;
  const setAside = members.filter((member, k) => isLeaf(member) && ratios[k] < TOO_LOW * middle);
  const doubted = members.filter((member, k) => isLeaf(member) && ratios[k] > TOO_HIGH * middle);
  const compared = members.filter((member) => !setAside.includes(member));
  const reference = compared.reduce((low, member) => (ratioAt(member, first)! < ratioAt(low, first)! ? member : low));

  for (const member of compared) {
    if (member === reference) continue;
    const flows = flowsOf(member).filter((flow) => flow.stand >= first);
    const pairs = flows.flatMap((flow) => {
      const against = ratioAt(reference, flow.stand);
      return against === undefined || against <= 0 ? [] : [{ kv: flow.kv, quotient: ratioOf(member, flow, excused) / against }];
    });
    const setsSince = (loop.sets.get(member.link) ?? []).filter((event) => event > flows[0].event);
    const last = flows[flows.length - 1];
    const isReadSinceSet = !setsSince.length || setsSince[setsSince.length - 1] < last.event;
    if (!isReadSinceSet) return { station, unread: null, reference, setAside, doubted, next: { station: member, pairs, unread: member } };
    if (ratioAt(reference, last.stand) === undefined) {
      // The loop moved on before the reference was read: both are read again as it stands now.
      const unread = last.stand === loop.stand ? reference : member;
      return { station, unread: null, reference, setAside, doubted, next: { station: member, pairs, unread } };
    }
    const { quotient } = pairs[pairs.length - 1];
    if (Math.abs(quotient - 1) <= criterion || setsSince.length >= MOST_SETS) continue;
    const unread = ratioAt(reference, loop.stand) === undefined ? reference : null;
    return { station, unread: null, reference, setAside, doubted, next: { station: member, pairs, unread } };
  }
  return { ...none, unread: null, reference, setAside, doubted };
}

/** First stand since changes below at which all members were read: where the reference is chosen. */
function firstCommonStand(members: Station[], loop: MeasuredLoop, since: number): number | undefined {
  const flows = members.map((member) => loop.flows.get(member.link) ?? []);
  return flows[0]
    .map((flow) => flow.stand)
    .find((stand) => stand >= since && flows.every((list) => list.some((flow) => flow.stand === stand)));
}

/** Stand after the last change of anything below the members: it changes their ratios for good. */
function lastSetBelow(members: Station[], loop: MeasuredLoop): number {
  let last = -1;
  const visit = (station: Station) => {
    for (const member of station.members) {
      for (const event of loop.sets.get(member.link) ?? []) last = Math.max(last, loop.standAfter[event]);
      visit(member);
    }
  };
  members.forEach(visit);
  return last;
}
