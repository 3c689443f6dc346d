import type { Station } from '@/lib/api/commissioning';
import { linkOfStation } from '@/lib/client/site-records';
import type { Commissioning } from '../commissioning-context';

/** The station that a link of the network belongs to: of a terminal unit's coil, its valve's. */
export function stationFinder({ body }: Commissioning): (link: string) => Station | undefined {
  const byLink = new Map(body.stations.map((station) => [linkOfStation(station), station]));
  const byElement = new Map(body.stations.map((station) => [station.elementId, station]));
  return (link) => byLink.get(link) ?? byElement.get(link.split(':')[0]!);
}
