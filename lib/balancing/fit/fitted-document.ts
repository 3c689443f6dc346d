import type { NetworkDocument, NetworkLink } from '@/lib/hydraulics/types';
import type { Unknown } from './unknowns';

/** The document with the fitted resistances, charts and pump heads in it, as it was in one round, or as a valve newly set would stand (`round` null). */
export function fittedDocument(
  document: NetworkDocument,
  unknowns: Unknown[],
  values: ArrayLike<number>,
  round: number | null,
): NetworkDocument {
  const logFactor = new Float64Array(document.links.length);
  unknowns.forEach((unknown, j) => {
    if (round === null ? unknown.kind === 'setting' : !unknown.rounds[round]) return;
    for (const at of unknown.links) logFactor[at] += values[j];
  });
  return { ...document, links: document.links.map((link, at) => (logFactor[at] ? scaled(link, Math.exp(logFactor[at])) : link)) };
}

/** A link whose resistance (a pump: head; a balancing valve: Kv) is multiplied. */
export function scaled(link: NetworkLink, factor: number): NetworkLink {
  switch (link.kind) {
    case 'pipe':
      return { ...link, lengthM: link.lengthM * factor, minorK: (link.minorK ?? 0) * factor };
    case 'terminal':
      return { ...link, designDropKpa: link.designDropKpa * factor };
    case 'resistance':
      return link.kv === undefined
        ? { ...link, designDropKpa: link.designDropKpa! * factor }
        : { ...link, kv: link.kv / Math.sqrt(factor) };
    case 'controlValve':
      return { ...link, kvs: link.kvs / Math.sqrt(factor) };
    case 'checkValve':
      return { ...link, kv: link.kv / Math.sqrt(factor) };
    case 'pump':
      return { ...link, curve: link.curve.map(({ flowLs, headM }) => ({ flowLs, headM: headM * factor })) };
    case 'balancingValve':
      return { ...link, kvTable: link.kvTable.map(({ setting, kv }) => ({ setting, kv: kv * factor })) };
    case 'flowLimiter':
    case 'dpController':
      throw new RangeError(`${link.id} holds a flow or a pressure of its own and has no resistance to fit`);
  }
}
