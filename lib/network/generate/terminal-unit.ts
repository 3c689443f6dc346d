import { dropAcrossValveKpa } from '@/lib/hydraulics/valve-coefficient';
import type { TerminalUnit } from '../drawing';
import { chooseBalancingValve } from './balancing-valve-choice';
import type { LoopChoices } from './loop-choices';
import { controlKvs, kvForMostDrop } from './preferred-kv';
import type { ScheduledTerminal } from './scheduled-terminal';
import type { Sheet, Spot } from './sheet';

/** What a clean strainer of a terminal may cost; common practice, no source. */
const MOST_STRAINER_DROP_KPA = 2.5;

/** A terminal of the schedule as a unit with strainer, control valve, coil and balancing valve, each chosen for its design flow. */
export function terminalUnit(sheet: Sheet, terminal: ScheduledTerminal, spot: Spot, { valves }: LoopChoices): TerminalUnit {
  const { tag, room, loadKw, designFlowLs, coilDropKpa } = terminal;
  const { densityKgM3 } = valves;
  const balancingValve = chooseBalancingValve(designFlowLs, valves);
  const strainerKv = kvForMostDrop(designFlowLs, MOST_STRAINER_DROP_KPA, densityKgM3);
  const openKv = balancingValve.kvTable.at(-1)!.kv;
  const restKpa =
    coilDropKpa + dropAcrossValveKpa(strainerKv, designFlowLs, densityKgM3) + dropAcrossValveKpa(openKv, designFlowLs, densityKgM3);
  return {
    ...sheet.placed(spot, tag),
    kind: 'terminalUnit',
    room,
    loadKw,
    designFlowLs,
    coilDropKpa,
    strainerKv,
    controlValve: { kvs: controlKvs(designFlowLs, restKpa, densityKgM3), characteristic: 'equalPercentage', opening: 1 },
    balancingValve,
  };
}
