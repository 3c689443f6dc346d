import type { ChosenValve, Equipment } from './drawing';
import { at, nameOf, type Fault } from './fault';

/** Figures that the law of a piece needs and that are not there yet. */
export function missingFigures(piece: Equipment): Fault[] {
  const lacks = (what: string): Fault => ({
    code: 'missing-data',
    severity: 'error',
    message: `${nameOf(piece)} has no ${what}.`,
    place: at(piece),
  });
  const lacking = (what: (string | false)[]) => what.filter((it) => it !== false).map(lacks);
  const fault = (code: string, message: string, severity: Fault['severity'] = 'error'): Fault => ({
    code,
    severity,
    message,
    place: at(piece),
  });
  switch (piece.kind) {
    case 'pump':
      return piece.curve.length < 3
        ? [fault('pump-curve', `${nameOf(piece)} needs at least three points on its curve.`)]
        : pumpCurveFaults(piece.curve, fault, nameOf(piece));
    case 'source':
      return lacking([piece.designFlowLs === null && 'design flow', piece.designDropKpa === null && 'drop at design flow']);
    case 'terminalUnit':
      return [
        piece.designFlowLs === null && lacks('design flow'),
        piece.coilDropKpa === null && lacks('coil drop'),
        piece.controlValve && piece.controlValve.kvs === null && lacks('Kvs of its control valve'),
        piece.balancingValve && valveFault(piece.balancingValve, nameOf(piece), fault),
        !piece.balancingValve &&
          fault('no-balancing-valve', `${nameOf(piece)} has no balancing valve: its flow can be neither set nor measured.`, 'warning'),
      ].filter((f) => Boolean(f)) as Fault[];
    case 'balancingValve':
      return [valveFault(piece.valve, nameOf(piece), fault)].filter((f) => f !== null);
    case 'controlValve':
      return piece.kvs === null ? [lacks('Kvs')] : [];
    case 'checkValve':
    case 'isolatingValve':
    case 'strainer':
      return piece.kv === null ? [lacks('Kv')] : [];
    case 'dpController':
      return lacking([piece.setpointKpa === null && 'set point', piece.kvs === null && 'Kvs']);
    case 'flowLimiter':
      return lacking([piece.limitLs === null && 'flow to hold', piece.minDropKpa === null && 'least drop']);
    case 'decoupler':
      return lacking([piece.lengthM === null && 'length', piece.boreMm === null && 'bore', piece.roughnessMm === null && 'roughness']);
    case 'flowStation':
      return lacking([piece.signalKv === null && 'Kv of its signal']);
    case 'tee':
    case 'header':
    case 'pressureStation':
    case 'expansionVessel':
      return [];
  }
}

type MakeFault = (code: string, message: string, severity?: Fault['severity']) => Fault;

function pumpCurveFaults(curve: { flowLs: number; headM: number }[], fault: MakeFault, name: string): Fault[] {
  const unsorted = curve.some((point, i) => i > 0 && point.flowLs <= curve[i - 1]!.flowLs);
  const rising = curve.some((point, i) => i > 0 && point.headM > curve[i - 1]!.headM);
  return [
    ...(unsorted ? [fault('pump-curve', `The curve of ${name} must go from low to high flow, each flow once.`)] : []),
    ...(rising ? [fault('pump-curve', `The head of ${name} must not rise with flow.`)] : []),
  ];
}

function valveFault(valve: ChosenValve, name: string, fault: MakeFault): Fault | null {
  if (valve.kvTable.length < 2) return fault('valve-table', `${name} has no table of settings and Kv: choose a valve.`);
  const first = valve.kvTable[0]!.setting;
  const last = valve.kvTable.at(-1)!.setting;
  if (valve.settingTurns !== null && (valve.settingTurns < first || valve.settingTurns > last)) {
    return fault('valve-setting', `${name} stands at ${valve.settingTurns}, outside its table (${first} to ${last}).`);
  }
  return null;
}
