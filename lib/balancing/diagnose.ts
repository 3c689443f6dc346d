import type { FittedLoop, FittedReading, SuspectedFault } from './fit-loop';
import { type LoopSignature, loopSignature } from './loop-signature';
import { type CauseCode, isUnitRatio, nextChecks } from './possible-causes';

export interface PossibleCause {
  cause: CauseCode;
  name: string;
  nextCheck: string;
}

/** What does not fit, where (null: the whole loop), why it is thought so, and what may be behind it, the likelier first. */
export interface Diagnosis {
  at: string | null;
  evidence: string;
  causes: PossibleCause[];
}

const LOW = 0.95;
const HIGH = 1.05;
const NEXT_TO_NONE = 0.15;
const HEAD_OFF = 0.03;
/** Resistance beyond which a circuit counts as shut: its flow is below about a sixth. */
const SHUT_FACTOR = 30;
const BELOW_ZERO = 4;

/**
 * Possible causes where the fit or the pattern of the last round says that something is wrong, after the published signatures: whether all flows fall by
 * one ratio or one stands out, total up or down, pump differential up or down.
 */
export function diagnose(fitted: FittedLoop): Diagnosis[] {
  const signature = loopSignature(fitted.document, fitted.rounds[fitted.rounds.length - 1]);
  const whole = wholeLoop(signature);
  const isMain = (fault: SuspectedFault) => fitted.document.links.some((link) => link.id === fault.link && link.kind !== 'terminal');
  const explained = (fault: SuspectedFault) =>
    whole !== null &&
    (fault.cause === 'pump-off-curve' ||
      (fault.cause === 'blocked' && isMain(fault)) ||
      (fault.cause === 'wrong-reading' && !signature.terminals.has(fault.link)));
  return [
    ...(whole ? [whole] : []),
    ...fitted.faults.filter((fault) => !explained(fault)).map((fault) => ofFault(fitted, fault)),
    ...fitted.readings.filter(isNegative).map(({ reading }) => ({
      at: reading.link,
      evidence: `The reading is negative (${reading.value.toFixed(2)}).`,
      causes: listed(['hoses-swapped']),
    })),
  ];
}

function wholeLoop({ middle, hasOneRatio, total, pumpHead, totalOverSum }: LoopSignature): Diagnosis | null {
  if (middle === null || middle >= LOW) return null;
  const share = `The terminals stand at ${percent(middle)} of what the design gives at these settings`;
  const head = pumpHead === null ? '' : `, the pump’s differential at ${percent(pumpHead)}`;
  const sum = total === null ? '' : `, the total at ${percent(total)}`;
  const evidence = `${share}${sum}${head}.`;
  if (middle < NEXT_TO_NONE)
    return {
      at: null,
      evidence,
      causes: listed(
        pumpHead === null || pumpHead > 1
          ? ['check-valve-stuck', 'main-strainer-blocked']
          : ['pump-reversed-or-wrong-impeller', 'check-valve-stuck'],
      ),
    };
  if (!hasOneRatio) return null;
  if ((total !== null && total > HIGH && middle < LOW) || (totalOverSum !== null && totalOverSum > 1 + 2 * HEAD_OFF))
    return { at: null, evidence, causes: listed(['bypass-open', 'reading-wrong']) };
  if (pumpHead === null)
    return { at: null, evidence, causes: listed(['main-strainer-blocked', 'pump-reversed-or-wrong-impeller', 'bypass-open']) };
  if (pumpHead > 1 + HEAD_OFF) return { at: null, evidence, causes: listed(['main-strainer-blocked', 'check-valve-stuck']) };
  if (pumpHead < 1 - HEAD_OFF && total !== null && total < LOW)
    return { at: null, evidence, causes: listed(['pump-reversed-or-wrong-impeller', 'pump-suction-starved']) };
  // All a little low with the pump as it should be: what stands out elsewhere takes it.
  return null;
}

function ofFault(fitted: FittedLoop, fault: SuspectedFault): Diagnosis {
  const { cause, link, factor } = fault;
  switch (cause) {
    case 'blocked': {
      const isTerminal = fitted.document.links.some((each) => each.id === link && each.kind === 'terminal');
      const evidence = `The resistance there is ${factor.toFixed(1)} times the design’s.`;
      if (!isTerminal) return { at: link, evidence, causes: listed(['main-strainer-blocked', 'isolating-valve-partly-shut']) };
      if (factor > SHUT_FACTOR)
        return {
          at: link,
          evidence: 'Next to no flow, while the others take more.',
          causes: listed(['isolating-valve-shut', 'air-lock', 'control-valve-not-open', 'strainer-or-coil-fouled']),
        };
      return {
        at: link,
        evidence,
        causes: listed(['strainer-or-coil-fouled', 'control-valve-not-open', 'isolating-valve-partly-shut', 'air-lock', 'wrong-chart']),
      };
    }
    case 'mis-set':
      return {
        at: link,
        evidence: `Its readings fit a Kv ${factor.toFixed(2)} times that of the setting noted in round ${fault.round + 1}.`,
        causes: listed(['valve-not-as-noted', 'wrong-chart', 'reading-wrong']),
      };
    case 'wrong-chart':
      return {
        at: link,
        evidence: `Its readings fit a Kv ${factor.toFixed(2)} times the chart’s at every setting so far.`,
        causes: listed(['wrong-chart', 'valve-not-as-noted', 'strainer-or-coil-fouled']),
      };
    case 'pump-off-curve':
      return {
        at: link,
        evidence: `It raises ${factor.toFixed(2)} times the head of its curve.`,
        causes: listed(['pump-reversed-or-wrong-impeller', 'pump-suction-starved', 'reading-wrong']),
      };
    case 'wrong-reading': {
      const evidence = `The reading in round ${fault.round + 1} is ${factor.toFixed(2)} times what the rest of the loop leads to.`;
      if (factor < 0) return { at: link, evidence, causes: listed(['hoses-swapped', 'reading-wrong']) };
      return {
        at: link,
        evidence,
        causes: listed(
          isUnitRatio(factor)
            ? ['unit-mixed-up', 'reading-wrong', 'valve-not-as-noted']
            : ['reading-wrong', 'unit-mixed-up', 'valve-not-as-noted'],
        ),
      };
    }
  }
}

const isNegative = ({ reading: { value, quantity, absolute = quantity === 'dropKpa' ? 0.1 : 0.001 } }: FittedReading) =>
  value < -BELOW_ZERO * absolute;
const listed = (causes: CauseCode[]): PossibleCause[] => causes.map((cause) => ({ cause, ...nextChecks[cause] }));
const percent = (ratio: number) => `${(100 * ratio).toFixed(0)} %`;
