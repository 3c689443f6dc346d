import { pipeSeries } from '@/lib/hydraulics/pipe-series';
import type { NetworkDocument } from '@/lib/hydraulics/types';

/** A pipe that is to be sized and comes without bore or roughness starts with its series' largest bore and roughness. */
export function withLargestBores(document: NetworkDocument): NetworkDocument {
  const links = document.links.map((link) => {
    if (link.kind !== 'pipe' || !link.size || !link.series) return link;
    const { sizes, roughnessMm } = pipeSeries[link.series];
    return { ...link, boreMm: link.boreMm ?? sizes[sizes.length - 1].boreMm, roughnessMm: link.roughnessMm ?? roughnessMm };
  });
  return { ...document, links };
}
