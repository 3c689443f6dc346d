import { balance } from '@/lib/hydraulics/balance';
import { dropAcrossValveKpa } from '@/lib/hydraulics/valve-coefficient';
import type { NetworkDocument, NetworkLink } from '@/lib/hydraulics/types';
import { genericValves } from '@/lib/network/valve-families';
import type { SeededRandom } from './seeded-random';

/** Risers, floors on each and terminals on each floor. */
export const layouts: Record<number, [risers: number, floors: number, terminals: number]> = {
  12: [1, 2, 6],
  60: [2, 3, 10],
  200: [4, 5, 10],
};

const BORES_MM = [15.8, 20.96, 26.64, 35.08, 40.94, 52.48, 62.68, 77.92, 102.26, 128.2, 154.08, 202.74];
const MOST_PA_PER_M = 250;
const LEAST_SIGNAL_KPA = 3;
/** A pump is bought with head to spare. */
const PUMP_MARGIN = 1.6;

/** Smallest bore that keeps the gradient at a friction factor of 0.025 (water, steel): rough, as a designer's chart is. */
function boreFor(flowLs: number): number {
  const gradient = (boreMm: number) => (0.025 / (boreMm / 1000)) * 500 * (flowLs / 1000 / ((Math.PI / 4) * (boreMm / 1000) ** 2)) ** 2;
  return BORES_MM.find((bore) => gradient(bore) <= MOST_PA_PER_M) ?? BORES_MM[BORES_MM.length - 1];
}

/** Largest generic valve that still gives a signal of 3 kPa fully open. */
function valveTableFor(flowLs: number) {
  const fit = genericValves.filter((valve) => dropAcrossValveKpa(valve.kvs, flowLs) >= LEAST_SIGNAL_KPA);
  return (fit[fit.length - 1] ?? genericValves[0]).kvTable;
}

/** The design of a direct-return building: terminals on floors, floors on risers, risers on mains, a balancing valve at each rank. */
export function designBuilding(terminals: number, random: SeededRandom): NetworkDocument {
  const [risers, floors, perFloor] = layouts[terminals];
  const links: NetworkLink[] = [];
  const flows = Array.from({ length: terminals }, () => Number(random.between(0.05, 0.25).toFixed(3)));
  const pipe = (id: string, from: string, to: string, flowLs: number, lengthM: number) => {
    links.push({ id, kind: 'pipe', from, to, lengthM, boreMm: boreFor(flowLs), roughnessMm: 0.045, minorK: 1.5 });
  };
  const valve = (id: string, from: string, to: string, flowLs: number) => {
    links.push({ id, kind: 'balancingValve', from, to, kvTable: valveTableFor(flowLs), settingStep: 0.1 });
  };
  const sum = (first: number, last: number) => flows.slice(first, last).reduce((total, each) => total + each, 0);

  const total = sum(0, terminals);
  links.push({
    id: 'PU',
    kind: 'pump',
    from: 'suction',
    to: 'discharge',
    curve: [0, 0.5, 1, 1.4].map((part) => ({ flowLs: part * total, headM: 60 })),
  });
  links.push({ id: 'CH', kind: 'resistance', from: 'discharge', to: 'S', designFlowLs: total, designDropKpa: 40 });
  valve('main', 'R', 'suction', total);
  let [supply, back] = ['S', 'R'];
  for (let r = 0; r < risers; r++) {
    const first = r * floors * perFloor;
    pipe(`main-s${r}`, supply, `S${r}`, sum(first, terminals), 15);
    pipe(`main-r${r}`, `R${r}`, back, sum(first, terminals), 15);
    [supply, back] = [`S${r}`, `R${r}`];
    let [up, down] = [supply, back];
    if (risers > 1) {
      valve(`riser${r}`, `E${r}`, back, sum(first, first + floors * perFloor));
      down = `E${r}`;
    }
    for (let f = 0; f < floors; f++) {
      const start = first + f * perFloor;
      pipe(`up${r}.${f}`, up, `U${r}.${f}`, sum(start, first + floors * perFloor), 4);
      pipe(`down${r}.${f}`, `D${r}.${f}`, down, sum(start, first + floors * perFloor), 4);
      [up, down] = [`U${r}.${f}`, `D${r}.${f}`];
      valve(`floor${r}.${f}`, `e${r}.${f}`, down, sum(start, start + perFloor));
      let [from, to] = [up, `e${r}.${f}`];
      for (let t = 0; t < perFloor; t++) {
        const place = `${r}.${f}.${t}`;
        pipe(`s${place}`, from, `s${place}`, sum(start + t, start + perFloor), 6);
        pipe(`r${place}`, `r${place}`, to, sum(start + t, start + perFloor), 6);
        [from, to] = [`s${place}`, `r${place}`];
        unit(place, flows[start + t]);
      }
    }
  }

  /** A terminal unit: strainer, coil, control valve and balancing valve in series. */
  function unit(place: string, designFlowLs: number) {
    const [from, to] = [`s${place}`, `r${place}`];
    links.push({ id: `strainer${place}`, kind: 'resistance', from, to: `a${place}`, designFlowLs, designDropKpa: 3 });
    links.push({
      id: `T${place}`,
      kind: 'terminal',
      from: `a${place}`,
      to: `b${place}`,
      designFlowLs,
      designDropKpa: Math.round(random.between(15, 35)),
    });
    const wanted = (36 * designFlowLs) / Math.sqrt(25);
    const kvs = [0.63, 1, 1.6, 2.5, 4, 6.3].find((each) => each >= wanted) ?? 6.3;
    links.push({ id: `control${place}`, kind: 'controlValve', from: `b${place}`, to: `c${place}`, kvs });
    valve(`V${place}`, `c${place}`, to, designFlowLs);
  }

  const ids = [...new Set(links.flatMap((link) => [link.from, link.to]))];
  const document: NetworkDocument = {
    format: 'network/1',
    fluid: { medium: 'water', temperatureC: 7 },
    reference: { node: 'suction', gaugePressureKpa: 150 },
    nodes: ids.map((id) => ({ id })),
    links,
  };
  const { requiredHeadM } = balance(document).pumps[0];
  const curve = [0, 0.5, 1, 1.4].map((part) => ({ flowLs: part * total, headM: PUMP_MARGIN * requiredHeadM * (1.2 - 0.2 * part ** 2) }));
  return { ...document, links: links.map((link) => (link.kind === 'pump' ? { ...link, curve } : link)) };
}
