/** The parts of a loop's commissioning, as the address names them; the stations stand at the address itself. */
export const commissioningViews = ['stations', 'readiness', 'next', 'findings', 'rounds', 'snags'] as const;
export type CommissioningView = (typeof commissioningViews)[number];

/** Which part an address below `base` names. */
export function viewAt(pathname: string, base: string): CommissioningView {
  const rest = pathname.slice(base.length + 1);
  return commissioningViews.find((view) => view === rest) ?? 'stations';
}
