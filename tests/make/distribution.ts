import type { NetworkDocument, NetworkLink } from '@/lib/hydraulics/types';

const FLUID = { medium: 'custom' as const, densityKgM3: 999.94, viscosityMPaS: 1.4284, specificHeatKJKgK: 4.1977 };
const DESIGN_LS = 0.2;
const PER_FLOOR = 25;
const FLOORS_PER_RISER = 20;
const STEEL_MM = 0.045;

/** Bore for about 1 m/s, not less than 16 mm. */
const boreFor = (flowLs: number) => Math.max(16, Math.sqrt((4 * flowLs * 1e-3) / Math.PI) * 1000);

/**
 * A building of direct-return floors on risers: `terminals` terminals, about three links each (supply pipe, terminal, return pipe), a balancing
 * valve a floor, one pump. `isMeshed` joins every fifth place of neighbouring floors, supply to supply and return to return.
 */
export function distribution(terminals: number, isMeshed = false): NetworkDocument {
  const links: NetworkLink[] = [];
  const pipe = (id: string, from: string, to: string, flowLs: number, lengthM: number) => {
    links.push({ id, kind: 'pipe', from, to, lengthM, boreMm: boreFor(flowLs), roughnessMm: STEEL_MM, minorK: 0.6 });
  };
  const total = terminals * DESIGN_LS;
  const curve = [0, 0.5, 1, 1.3, 1.6].map((part) => ({ flowLs: part * total, headM: 26 - 6 * part ** 2 }));
  links.push({ id: 'pump', kind: 'pump', from: 'suction', to: 'discharge', curve });
  links.push({ id: 'source', kind: 'resistance', from: 'discharge', to: 'S', designFlowLs: total, designDropKpa: 30 });

  const floors = Math.ceil(terminals / PER_FLOOR);
  const risers = Math.ceil(floors / FLOORS_PER_RISER);
  let supply = 'S';
  let back = 'suction';
  for (let r = 0; r < risers; r++) {
    const remaining = terminals - r * FLOORS_PER_RISER * PER_FLOOR;
    pipe(`main-s${r}`, supply, `S${r}`, remaining * DESIGN_LS, 6);
    pipe(`main-r${r}`, `R${r}`, back, remaining * DESIGN_LS, 6);
    supply = `S${r}`;
    back = `R${r}`;
    let [up, down] = [supply, back];
    for (let f = r * FLOORS_PER_RISER; f < Math.min(floors, (r + 1) * FLOORS_PER_RISER); f++) {
      const above = Math.min(terminals, (r + 1) * FLOORS_PER_RISER * PER_FLOOR) - f * PER_FLOOR;
      pipe(`up${f}`, up, `U${f}`, above * DESIGN_LS, 3.5);
      pipe(`down${f}`, `D${f}`, down, above * DESIGN_LS, 3.5);
      up = `U${f}`;
      down = `D${f}`;
      floor(f, Math.min(PER_FLOOR, terminals - f * PER_FLOOR));
    }
  }

  function floor(f: number, count: number) {
    const kvTable = [0.5, 1, 2, 3, 4].map((setting) => ({ setting, kv: 1.2 * count * DESIGN_LS * 3.6 * (setting / 4) ** 1.6 }));
    links.push({ id: `valve${f}`, kind: 'balancingValve', from: `e${f}`, to: `D${f}`, kvTable });
    let [from, to] = [`U${f}`, `e${f}`];
    for (let t = 0; t < count; t++) {
      const place = `${f}.${t}`;
      pipe(`s${place}`, from, `s${place}`, (count - t) * DESIGN_LS, 4);
      pipe(`r${place}`, `r${place}`, to, (count - t) * DESIGN_LS, 4);
      const designDropKpa = 28 + ((f * 7 + t * 3) % 11);
      links.push({ id: `T${place}`, kind: 'terminal', from: `s${place}`, to: `r${place}`, designFlowLs: DESIGN_LS, designDropKpa });
      if (isMeshed && f % FLOORS_PER_RISER > 0 && t % 5 === 4) {
        pipe(`xs${place}`, `s${f - 1}.${t}`, `s${place}`, DESIGN_LS, 4);
        pipe(`xr${place}`, `r${place}`, `r${f - 1}.${t}`, DESIGN_LS, 4);
      }
      [from, to] = [`s${place}`, `r${place}`];
    }
  }

  const ids = [...new Set(links.flatMap((link) => [link.from, link.to]))];
  return {
    format: 'network/1',
    fluid: FLUID,
    reference: { node: 'suction', gaugePressureKpa: 150 },
    nodes: ids.map((id) => ({ id })),
    links,
  };
}
