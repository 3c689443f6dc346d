const STANDARD_GRAVITY_MS2 = 9.80665;

interface CurvedPump {
  kind: string;
  curve?: readonly { flowLs: number; headM: number }[];
  speed?: number;
}

/**
 * Drop that a loop's pumps could give together at no flow, kPa: rho g H at each curve's highest head, with the speed's square
 * (affinity law), added up. An upper bound, since pumps side by side do not add their heads; null for a loop without a pump.
 */
export function shutOffDropKpa(links: readonly CurvedPump[], densityKgM3: number): number | null {
  const heads = links
    .filter(({ kind, curve }) => kind === 'pump' && curve?.length)
    .map(({ curve, speed }) => Math.max(...curve!.map(({ headM }) => headM)) * (speed ?? 1) ** 2);
  return heads.length ? (heads.reduce((sum, headM) => sum + headM, 0) * densityKgM3 * STANDARD_GRAVITY_MS2) / 1000 : null;
}
