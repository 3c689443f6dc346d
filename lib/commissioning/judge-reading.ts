import { flowFromDrop, type ValvePoint } from './reading-flow';
import { dropUncertaintyPercent, flowUncertaintyPercent, type Accuracy } from './uncertainty';
import { certaintyOf, percentOfDesign, verdictOf, type Band, type Certainty, type Verdict } from './verdict';

/** What was read: a drop across the valve at a setting, or a flow. L/s, kPa, turns. */
export type Measured = { method: 'valve-drop'; settingTurns: number; dropKpa: number } | { method: 'direct-flow'; flowLs: number };

interface JudgedAgainst {
  designFlowLs: number;
  kvTable: readonly ValvePoint[] | null;
  densityKgM3: number;
  accuracy: Accuracy;
  band: Band;
}

export interface Judgement {
  ok: true;
  /** Null where the flow was read directly. */
  kv: number | null;
  flowLs: number;
  percentOfDesign: number;
  uncertaintyPercent: number;
  verdict: Verdict;
  certainty: Certainty;
}

/** What a reading says of its station: worked out on the tablet while it is typed, and again by the server, by the same rules. */
export function judgeReading(measured: Measured, against: JudgedAgainst): Judgement | { ok: false; path: string; message: string } {
  const { designFlowLs, accuracy, band } = against;
  if (measured.method === 'direct-flow') {
    const { flowLs } = measured;
    return judged({ kv: null, flowLs, uncertaintyPercent: flowUncertaintyPercent(flowLs, accuracy) }, designFlowLs, band);
  }
  const found = flowFromDrop({ ...measured, kvTable: against.kvTable, densityKgM3: against.densityKgM3 });
  if (!found.ok) return found;
  const { kv, flowLs } = found;
  return judged({ kv, flowLs, uncertaintyPercent: dropUncertaintyPercent(measured.dropKpa, accuracy) }, designFlowLs, band);
}

function judged(flow: Pick<Judgement, 'kv' | 'flowLs' | 'uncertaintyPercent'>, designFlowLs: number, band: Band): Judgement {
  const percent = percentOfDesign(flow.flowLs, designFlowLs);
  return {
    ok: true,
    ...flow,
    percentOfDesign: percent,
    verdict: verdictOf(percent, band),
    certainty: certaintyOf(percent, flow.uncertaintyPercent, band),
  };
}
