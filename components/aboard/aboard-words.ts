import type { AboardLoop } from '@/lib/client/aboard';

const counted = (count: number, one: string, many: string): string => `${count} ${count === 1 ? one : many}`;

/** "revision 2 with drawing and schedule, 42 stations, 3 rounds, 118 entries, 2 meters". */
export function aboardWords({ revision, body, site }: AboardLoop): string {
  const snags = site.snags.filter(({ resolution }) => !resolution).length;
  return [
    revision ? `revision ${revision.number} with its drawing and schedule` : 'nothing issued yet',
    counted(body.stations.length, 'station', 'stations'),
    counted(body.rounds.length, 'round', 'rounds'),
    counted(body.readings.length, 'entry', 'entries'),
    counted(body.instruments.filter(({ isRetired }) => !isRetired).length, 'meter', 'meters'),
    ...(snags ? [counted(snags, 'open snag', 'open snags')] : []),
  ].join(', ');
}
