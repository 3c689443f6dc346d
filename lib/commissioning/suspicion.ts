import type { Measured } from './judge-reading';
import { isOutOfRange } from './measured-of';
import { readingMethods } from './reading-methods';

export interface Question {
  code:
    | 'unit'
    | 'above-shut-off'
    | 'unreliable-signal'
    | 'low-signal'
    | 'equal-to-design'
    | 'overdue'
    | 'no-certificate'
    | 'out-of-range'
    | 'far-from-last';
  message: string;
}

interface Asked {
  measured: Measured;
  flowLs: number;
  designFlowLs: number;
  /** Of the round before, where there was one. */
  lastFlowLs?: number | null;
  /** Drop that the loop's pumps give together at no flow, kPa; null where it is not known. */
  pumpShutOffKpa: number | null;
  instrument: { rangeLow: number | null; rangeHigh: number | null; calibrationDueOn: string | null; isOverdue: boolean };
}

/** Below this a differential pressure is unreliable, and below the next it is a low signal, kPa (common practice). */
export const signalFloors = { unreliableKpa: 1, lowKpa: 3 } as const;

/** A flow that is more than this many times the last one, or less than that part of it, is asked about (common practice, no source). */
const FAR = 1.5;

interface UnitSlip {
  /** Flow found over flow that is there. */
  ratio: number;
  message: string;
  /** How far, as a share, the real flow may be from design and still be asked about. */
  span: number;
}

// A wrong unit shows as its ratio times a real flow that is seldom design itself, hence the wide span; the ratio of Cv to Kv is so
// near to 1 that only a close hit is worth a question. Ratios: 3.6 m³/h in 1 L/s; 15.85 US gpm in 1 L/s; 10 mbar in 1 kPa; 6.895 kPa
// in 1 psi; Cv = 1.156 Kv. A drop enters the flow under a root.
const wide = 0.12;
const dropSlips: UnitSlip[] = [
  { ratio: Math.sqrt(10), span: wide, message: 'Was the drop in mbar instead of kPa?' },
  { ratio: 1 / Math.sqrt(10), span: wide, message: 'Was the drop in metres of water or tenths of a bar instead of kPa?' },
  { ratio: Math.sqrt(6.895), span: wide, message: 'Was a drop in kPa taken for psi?' },
  { ratio: 1 / Math.sqrt(6.895), span: wide, message: 'Was the drop in psi instead of kPa?' },
  { ratio: 1.156, span: 0.012, message: 'Is the valve’s table in Cv instead of Kv?' },
  { ratio: 1 / 1.156, span: 0.012, message: 'Is the valve’s table in Kv taken for Cv?' },
];
const flowSlips: UnitSlip[] = [
  { ratio: 3.6, span: wide, message: 'Was the flow in m³/h instead of L/s?' },
  { ratio: 1 / 3.6, span: wide, message: 'Was a flow in L/s taken for m³/h?' },
  { ratio: 15.85, span: wide, message: 'Was the flow in US gpm instead of L/s?' },
  { ratio: 1 / 15.85, span: wide, message: 'Was a flow in L/s taken for US gpm?' },
  { ratio: 10, span: wide, message: 'Has the decimal point slipped by one place?' },
  { ratio: 1 / 10, span: wide, message: 'Has the decimal point slipped by one place?' },
];

// A drop across a pump does not enter under a root, and a heat balance has units of its own: a slip there has another ratio.
const slipsOf: Record<Measured['method'], UnitSlip[]> = {
  'valve-drop': dropSlips,
  'coil-differential': dropSlips.filter(({ span }) => span === wide),
  'direct-flow': flowSlips,
  'pump-differential': [],
  'heat-balance': [],
};
const unitOfMeter = { 'differential-pressure': 'kPa', flow: 'L/s', temperature: '°C' } as const;

/**
 * What to ask before a reading is kept; it may always be kept as read. A question names what would explain the figure, and never
 * changes it.
 */
export function questionsAbout({ measured, flowLs, designFlowLs, lastFlowLs = null, pumpShutOffKpa, instrument }: Asked): Question[] {
  const questions: Question[] = [];
  const ratio = flowLs / designFlowLs;
  const slip = nearestSlip(ratio, slipsOf[measured.method]);
  if (slip)
    questions.push({ code: 'unit', message: `${ratio >= 1 ? ratio.toPrecision(3) : ratio.toFixed(3)} times design. ${slip.message}` });

  if ('dropKpa' in measured) {
    const { dropKpa } = measured;
    if (pumpShutOffKpa !== null && dropKpa > pumpShutOffKpa) {
      questions.push({
        code: 'above-shut-off',
        message: `More than the pumps give at no flow (${pumpShutOffKpa.toFixed(0)} kPa). Check the unit and the zero.`,
      });
    }
    if (dropKpa < signalFloors.unreliableKpa) {
      questions.push({ code: 'unreliable-signal', message: 'A signal under 1 kPa is unreliable. Can it be read at a smaller setting?' });
    } else if (dropKpa < signalFloors.lowKpa) {
      questions.push({ code: 'low-signal', message: 'A signal of 1 to 3 kPa is low: are the gauges bled and zeroed?' });
    }
  }
  if (lastFlowLs !== null && lastFlowLs > 0 && Math.abs(Math.log(Math.max(flowLs, 1e-9) / lastFlowLs)) > Math.log(FAR)) {
    questions.push({
      code: 'far-from-last',
      message: `${(flowLs / lastFlowLs).toPrecision(3)} times the last round’s flow. Was something changed here since?`,
    });
  }
  // Flows that equal design to the hundredth are known as the mark of data that nobody measured.
  if (Math.abs(ratio - 1) < 0.00005)
    questions.push({ code: 'equal-to-design', message: 'Exactly the design flow. Is this what the meter shows?' });

  if (instrument.isOverdue)
    questions.push({ code: 'overdue', message: `The meter’s calibration was due on ${instrument.calibrationDueOn}. Is another at hand?` });
  if (instrument.calibrationDueOn === null)
    questions.push({ code: 'no-certificate', message: 'No calibration date is recorded for this meter.' });
  if (isOutOfRange(measured, instrument)) {
    questions.push({
      code: 'out-of-range',
      message: `Outside the meter’s range (${instrument.rangeLow ?? 0} to ${instrument.rangeHigh ?? '…'} ${unitOfMeter[readingMethods[measured.method].instrument]}).`,
    });
  }
  return questions;
}

function nearestSlip(ratio: number, slips: UnitSlip[]): UnitSlip | null {
  if (!(ratio > 0) || slips.length === 0) return null;
  const distance = (slip: UnitSlip) => Math.abs(Math.log(ratio / slip.ratio)) / Math.log(1 + slip.span);
  const nearest = slips.reduce((near, slip) => (distance(slip) < distance(near) ? slip : near));
  return distance(nearest) <= 1 ? nearest : null;
}
