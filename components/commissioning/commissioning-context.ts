import type { CommissioningBody, Reading, Round, Station } from '@/lib/api/commissioning';
import type { StripTick } from '@/lib/commissioning/flow-strip';
import type { LoopState, RevisionBody } from '@/lib/api/loops';
import type { SiteBody } from '@/lib/api/site';
import type { KeptOf } from '@/lib/client/kept-entry';
import type { Outbox, OutboxState } from '@/lib/client/outbox';

/** What every part of a loop's commissioning looks at. */
export interface Commissioning {
  loop: { id: string; name: string; projectId: string; state: LoopState };
  /** Address of the list of stations. */
  base: string;
  personId: string;
  body: CommissioningBody;
  site: SiteBody;
  /** The revision as it was taken along; null where the page came from the server. */
  revision: RevisionBody | null;
  outbox: Outbox;
  outboxState: OutboxState;
  /** Readings at this loop that are on this device alone. */
  keptReadings: KeptOf<'reading'>[];
  /** The open round. */
  round: Round | null;
  /** The open round, or the last one. */
  shownRound: Round | null;
  /** Whether this person may enter readings now. */
  isEntryOpen: boolean;
  mayRecord: boolean;
  mayRaise: boolean;
  /** The entries that count in the round shown and in the one before, by station. */
  standing: Map<string, Reading>;
  lastStanding: Map<string, Reading>;
}

/** Entries of this tablet that wait at a station in the open round. */
export const waitingAt = ({ keptReadings, round }: Commissioning, stationId: string): KeptOf<'reading'>[] =>
  keptReadings.filter(({ content }) => content.body.stationId === stationId && content.roundId === round?.id);

/** Stations measured in the round shown, those included whose entry still waits on this tablet. */
export const measuredIn = (commissioning: Commissioning): number =>
  commissioning.body.stations.filter(({ id }) => commissioning.standing.has(id) || waitingAt(commissioning, id).length > 0).length;

/** The strip of the round shown: each terminal in walking order as it stands there. */
export const stripOf = ({ body, standing }: Commissioning): StripTick[] =>
  body.stations
    .filter(({ kind }) => kind === 'terminal')
    .map(({ id, tag }) => {
      const reading = standing.get(id);
      return { tag, percentOfDesign: reading?.percentOfDesign ?? null, verdict: reading?.verdict ?? null };
    });

/** "±10 %" or "0 to +10 %". */
export function bandWords({ lowerPercent, upperPercent }: { lowerPercent: number; upperPercent: number }): string {
  if (-lowerPercent === upperPercent) return `±${upperPercent} %`;
  return `${lowerPercent === 0 ? '0' : `−${-lowerPercent}`} to +${upperPercent} %`;
}

export const placeOf = ({ storey, room }: Pick<Station, 'storey' | 'room'>): string =>
  [storey, room && `room ${room}`].filter(Boolean).join(', ') || 'No place on the drawing';

/**
 * Whether the list is asked of the server when it is opened: something was sent since this page came, so the strip at its head is no
 * longer true, and there is signal to ask by.
 */
export const isListStale = ({ outboxState }: Commissioning): boolean =>
  outboxState.hasSent && outboxState.entries.length === 0 && !outboxState.isOffline && navigator.onLine;
