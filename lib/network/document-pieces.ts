import type { BalancingValveLink, NetworkLink } from '@/lib/hydraulics/types';
import type { ChosenValve, Equipment, TerminalUnit } from './drawing';

type Placed = Pick<Equipment, 'id' | 'tag' | 'storeyId' | 'x' | 'y' | 'rotation' | 'isMirrored'>;
export type PieceLink = Exclude<NetworkLink, { kind: 'pipe' }>;

/** A terminal's link with what stands in series with it, as one piece of a drawing holds it. */
export interface UnitChain {
  strainer?: NetworkLink & { kind: 'resistance' };
  control?: NetworkLink & { kind: 'controlValve' };
  coil: NetworkLink & { kind: 'terminal' };
  balancing?: BalancingValveLink;
}

/** What a drawing has no place for is told in `notes`: its calculation will differ by that. */
export function unitOf({ strainer, control, coil, balancing }: UnitChain, placed: Placed, notes: string[]): TerminalUnit {
  if (coil.exponent !== undefined && coil.exponent !== 2)
    notes.push(`${coil.id}: a drop that grows by the exponent ${coil.exponent} is taken as quadratic.`);
  if (control) noteRangeability(control, notes);
  return {
    ...placed,
    kind: 'terminalUnit',
    room: '',
    loadKw: coil.loadKw && coil.loadKw > 0 ? coil.loadKw : null,
    designFlowLs: coil.designFlowLs,
    coilDropKpa: coil.designDropKpa,
    strainerKv: strainer?.kv ?? null,
    controlValve: control
      ? { kvs: control.kvs, characteristic: control.characteristic ?? 'equalPercentage', opening: control.opening ?? 1 }
      : null,
    balancingValve: balancing ? valveOf(balancing) : null,
  };
}

const valveOf = ({ id, kvTable, setting, locked, settingStep }: BalancingValveLink): ChosenValve => ({
  name: `Valve of ${id}`.slice(0, 200),
  kvTable: kvTable.map((point) => ({ setting: point.setting, kv: point.kv })),
  settingTurns: setting ?? null,
  isLocked: locked ?? false,
  ...(settingStep === undefined ? {} : { stepTurns: settingStep }),
});

function noteRangeability(link: NetworkLink & { kind: 'controlValve' }, notes: string[]): void {
  if (link.rangeability !== undefined && link.rangeability !== 50)
    notes.push(`${link.id}: its rangeability of ${link.rangeability} is taken as 50.`);
}

/** The piece of a link with two ends. A closed one must be a plain Kv: it becomes an isolating valve that stands closed. */
export function pieceOfLink(link: PieceLink, placed: Placed, notes: string[]): Equipment {
  switch (link.kind) {
    case 'pump':
      if ((link.speed ?? 1) > 2) notes.push(`${link.id}: its speed of ${link.speed} is taken as 2.`);
      return {
        ...placed,
        kind: 'pump',
        curve: link.curve.map(({ flowLs, headM }) => ({ flowLs, headM })),
        efficiency: (link.efficiency ?? []).map(({ flowLs, fraction }) => ({ flowLs, fraction })),
        speed: Math.min(link.speed ?? 1, 2),
        hasNonReturn: link.nonReturn ?? true,
      };
    case 'terminal':
      return unitOf({ coil: link }, placed, notes);
    case 'balancingValve':
      return { ...placed, kind: 'balancingValve', valve: valveOf(link) };
    case 'controlValve':
      noteRangeability(link, notes);
      return {
        ...placed,
        kind: 'controlValve',
        kvs: link.kvs,
        characteristic: link.characteristic ?? 'equalPercentage',
        opening: link.opening ?? 1,
      };
    case 'resistance':
      if (link.kv === undefined)
        return {
          ...placed,
          kind: 'source',
          sourceKind: 'heat-exchanger',
          designFlowLs: link.designFlowLs!,
          designDropKpa: link.designDropKpa!,
        };
      return { ...placed, kind: 'isolatingValve', kv: link.kv, isClosed: link.closed ?? false };
    case 'checkValve':
      return { ...placed, kind: 'checkValve', kv: link.kv };
    case 'flowLimiter':
      return { ...placed, kind: 'flowLimiter', limitLs: link.limitLs, minDropKpa: link.minDropKpa };
    case 'dpController':
      return { ...placed, kind: 'dpController', setpointKpa: link.setpointKpa, kvs: link.kvs, senseHigh: null, senseLow: null };
  }
}
