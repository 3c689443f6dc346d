interface Entry {
  id: string;
  stationId: string;
  roundId: string;
  correctsReadingId: string | null;
  /** ISO date and time. */
  takenAt: string;
}

/** Ids of the entries that a later one puts right; they stay in the record and count no more. */
export const correctedIds = (entries: readonly Entry[]): Set<string> =>
  new Set(entries.flatMap(({ correctsReadingId }) => (correctsReadingId === null ? [] : [correctsReadingId])));

/**
 * The entry that counts at each station in one round: the newest that nothing puts right. Of two taken at one moment the later id
 * counts (ids are in order of time, RFC 9562 version 7).
 */
export function standingReadings<E extends Entry>(entries: readonly E[], roundId: string): Map<string, E> {
  const corrected = correctedIds(entries);
  const standing = new Map<string, E>();
  for (const entry of entries) {
    if (entry.roundId !== roundId || corrected.has(entry.id)) continue;
    const known = standing.get(entry.stationId);
    if (!known || isNewer(entry, known)) standing.set(entry.stationId, entry);
  }
  return standing;
}

function isNewer(entry: Entry, known: Entry): boolean {
  const difference = Date.parse(entry.takenAt) - Date.parse(known.takenAt);
  return difference === 0 ? entry.id > known.id : difference > 0;
}
