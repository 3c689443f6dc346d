import { flowAcrossCoil, flowFromHeat, flowOnPumpCurve, type IndirectFlow } from './indirect-flow';
import { flowFromDrop, type ValvePoint } from './reading-flow';
import { dropUncertaintyPercent, flowUncertaintyPercent, type Accuracy } from './uncertainty';
import { certaintyOf, percentOfDesign, verdictOf, type Band, type Certainty, type Verdict } from './verdict';

/** What was read, by method. L/s, kPa, turns, kW, °C; speed as a part of full speed. */
export type Measured =
  | { method: 'valve-drop'; settingTurns: number; dropKpa: number }
  | { method: 'direct-flow'; flowLs: number }
  | { method: 'coil-differential'; dropKpa: number }
  | { method: 'pump-differential'; dropKpa: number; pumpSpeed: number }
  | { method: 'heat-balance'; heatKw: number; supplyC: number; returnC: number };

interface JudgedAgainst {
  designFlowLs: number;
  kvTable: readonly ValvePoint[] | null;
  /** Of the coil at its design flow; null where the station has none. */
  coilDropKpa: number | null;
  /** At full speed; null where the station is no pump. */
  pumpCurve: { flowLs: number; headM: number }[] | null;
  densityKgM3: number;
  specificHeatKJKgK: number;
  accuracy: Accuracy;
  band: Band;
}

export interface Judgement {
  ok: true;
  /** Null where no valve was read across. */
  kv: number | null;
  flowLs: number;
  percentOfDesign: number;
  uncertaintyPercent: number;
  verdict: Verdict;
  certainty: Certainty;
}

type Refused = { ok: false; path: string; message: string };

/** What a reading says of its station: worked out on the tablet while it is typed, and again by the server, by the same rules. */
export function judgeReading(measured: Measured, against: JudgedAgainst): Judgement | Refused {
  const found = flowOf(measured, against);
  if (!found.ok) return found;
  const { kv, flowLs, uncertaintyPercent } = found;
  const percent = percentOfDesign(flowLs, against.designFlowLs);
  return {
    ok: true,
    kv,
    flowLs,
    uncertaintyPercent,
    percentOfDesign: percent,
    verdict: verdictOf(percent, against.band),
    certainty: certaintyOf(percent, uncertaintyPercent, against.band),
  };
}

type Flow = { ok: true; kv: number | null; flowLs: number; uncertaintyPercent: number } | Refused;

function flowOf(measured: Measured, against: JudgedAgainst): Flow {
  const { accuracy, densityKgM3, specificHeatKJKgK } = against;
  switch (measured.method) {
    case 'direct-flow': {
      const { flowLs } = measured;
      return { ok: true, kv: null, flowLs, uncertaintyPercent: flowUncertaintyPercent(flowLs, accuracy) };
    }
    case 'valve-drop': {
      const found = flowFromDrop({ ...measured, kvTable: against.kvTable, densityKgM3 });
      return found.ok ? { ...found, uncertaintyPercent: dropUncertaintyPercent(measured.dropKpa, accuracy) } : found;
    }
    case 'coil-differential': {
      const { coilDropKpa, designFlowLs } = against;
      if (coilDropKpa === null) return { ok: false, path: 'method', message: 'The design gives no drop for this station’s coil.' };
      return withoutKv(flowAcrossCoil(measured.dropKpa, { flowLs: designFlowLs, dropKpa: coilDropKpa }, accuracy));
    }
    case 'pump-differential': {
      const { pumpCurve } = against;
      if (pumpCurve === null) return { ok: false, path: 'method', message: 'This station has no pump with a curve.' };
      return withoutKv(flowOnPumpCurve({ ...measured, speed: measured.pumpSpeed, curve: pumpCurve, densityKgM3 }, accuracy));
    }
    case 'heat-balance':
      return withoutKv(flowFromHeat({ ...measured, densityKgM3, specificHeatKJKgK }, accuracy));
  }
}

const withoutKv = (found: IndirectFlow): Flow => (found.ok ? { ...found, kv: null } : found);
