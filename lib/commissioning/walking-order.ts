interface Walked {
  walkingOrder: number;
}

/** The station before and after one in walking order. */
export function neighbours<S extends Walked>(stations: readonly S[], at: S): { before: S | null; next: S | null } {
  const walked = [...stations].sort((a, b) => a.walkingOrder - b.walkingOrder);
  const i = walked.findIndex(({ walkingOrder }) => walkingOrder === at.walkingOrder);
  return { before: walked[i - 1] ?? null, next: walked[i + 1] ?? null };
}

/** Stations by storey, both in walking order; those without a storey under an empty name. */
export function byStorey<S extends Walked & { storey: string }>(stations: readonly S[]): { storey: string; stations: S[] }[] {
  const groups = new Map<string, S[]>();
  for (const station of [...stations].sort((a, b) => a.walkingOrder - b.walkingOrder)) {
    groups.set(station.storey, [...(groups.get(station.storey) ?? []), station]);
  }
  return [...groups].map(([storey, grouped]) => ({ storey, stations: grouped }));
}

/** The station that is come to first. */
export const firstOf = <S extends Walked>(stations: readonly S[]): S | undefined =>
  stations.reduce<S | undefined>((first, it) => (first && first.walkingOrder <= it.walkingOrder ? first : it), undefined);

/** A list with the item at `from` put at `to`. */
export function moved<Item>(items: readonly Item[], from: number, to: number): Item[] {
  const rest = items.filter((_, at) => at !== from);
  return [...rest.slice(0, to), items[from]!, ...rest.slice(to)];
}

/** Stations with the order that was set by hand: those in it first, the others after them as they were. */
export function inHandOrder<S extends Walked & { id: string }>(stations: readonly S[], order: ReadonlyMap<string, number>): S[] {
  const place = (station: S) => order.get(station.id) ?? Infinity;
  return [...stations]
    .sort((a, b) => (place(a) === place(b) ? a.walkingOrder - b.walkingOrder : place(a) - place(b)))
    .map((station, at) => ({ ...station, walkingOrder: at + 1 }));
}
