import type { Spot } from './sheet';
import { longer, turned, type Run, type Sheet } from './sheet';
import type { BranchPlaces } from './branch-columns';
import { chooseBalancingValve } from './balancing-valve-choice';
import { flowOf } from './building';
import type { LoopChoices } from './loop-choices';
import { RETURN_BELOW, rowSpan, UNIT_BELOW } from './measures';
import type { ScheduledTerminal } from './scheduled-terminal';
import { terminalUnit } from './terminal-unit';

interface Branch {
  terminals: ScheduledTerminal[];
  places: BranchPlaces;
  /** Where the supply line begins: at the supply riser. */
  start: Spot;
  valveTag: string;
}

/**
 * One branch: its units between a supply line above and a return line below. With a direct return the line goes back to the riser the way the supply came;
 * with a reverse return it runs on with the supply and comes back from the far end, so that the way through every unit is equally long.
 */
export function drawBranch(sheet: Sheet, supply: Run, back: Run, branch: Branch, choices: LoopChoices): void {
  const { terminals, places, start, valveTag } = branch;
  const { terminalSpacingM: spacingM, returnPiping } = choices.options;
  const at = (right: number, below: number): Spot => ({ ...start, x: start.x + right, y: start.y + below });
  const units = terminals.map((terminal, k) => sheet.add(terminalUnit(sheet, terminal, at(places.units[k], UNIT_BELOW), choices)));

  let toRiser = back;
  let nearM = spacingM;
  if (places.valve !== null) {
    const spot = at(places.valve, rowSpan(returnPiping));
    const valve = chooseBalancingValve(flowOf(terminals), choices.valves);
    const id = sheet.add({ ...sheet.placed(spot, sheet.tag('BV', valveTag), 180), kind: 'balancingValve', valve });
    nearM = spacingM / 2;
    sheet.join(longer(back, nearM), id, 'out');
    toRiser = sheet.begin(id, 'in', 'return');
  }
  const line = { sheet, units, at, places, choices };
  drawSupply(line, supply);
  if (returnPiping === 'direct') drawDirectReturn(line, toRiser, nearM);
  else drawReverseReturn(line, toRiser, nearM);
}

interface Line {
  sheet: Sheet;
  units: string[];
  at: (right: number, below: number) => Spot;
  places: BranchPlaces;
  choices: LoopChoices;
}

/** Tees from near to far; the last unit ends the line. */
function drawSupply({ sheet, units, at, places, choices }: Line, begun: Run): void {
  const { terminalSpacingM, runOutM } = choices.options;
  let run = begun;
  units.forEach((unit, k) => {
    run = longer(run, terminalSpacingM);
    if (k === units.length - 1) return sheet.join(turned(longer(run, runOutM), at(places.units[k], 0)), unit, 'in');
    const tee = sheet.tee(at(places.units[k], 0));
    sheet.join(run, tee, 'w');
    sheet.join(longer(sheet.begin(tee, 's', 'supply'), runOutM, 'tee-branch'), unit, 'in');
    run = longer(sheet.begin(tee, 'e', 'supply'), 0, 'tee-run');
  });
}

function drawDirectReturn({ sheet, units, at, places, choices }: Line, begun: Run, nearM: number): void {
  const { terminalSpacingM, runOutM } = choices.options;
  let run = begun;
  units.forEach((unit, k) => {
    run = longer(run, k === 0 ? nearM : terminalSpacingM);
    if (k === units.length - 1) return sheet.join(turned(longer(run, runOutM), at(places.units[k], RETURN_BELOW)), unit, 'out');
    const tee = sheet.tee(at(places.units[k], RETURN_BELOW));
    sheet.join(run, tee, 'w');
    sheet.join(longer(sheet.begin(tee, 'n', 'return'), runOutM, 'tee-branch'), unit, 'out');
    run = longer(sheet.begin(tee, 'e', 'return'), 0, 'tee-run');
  });
}

/** From where the water arrives at the riser: the way back along the whole branch, then tees from far to near. */
function drawReverseReturn({ sheet, units, at, places, choices }: Line, begun: Run, nearM: number): void {
  const { terminalSpacingM, runOutM } = choices.options;
  const last = units.length - 1;
  let run = longer(begun, nearM + last * terminalSpacingM);
  if (last > 0) run = turned(turned(run, at(places.turn, rowSpan('reverse'))), at(places.turn, RETURN_BELOW));
  for (let k = last; k > 0; k--) {
    const tee = sheet.tee(at(places.units[k], RETURN_BELOW));
    sheet.join(run, tee, 'e');
    sheet.join(longer(sheet.begin(tee, 'n', 'return'), runOutM, 'tee-branch'), units[k], 'out');
    run = longer(sheet.begin(tee, 'w', 'return'), terminalSpacingM, 'tee-run');
  }
  const corner = at(places.units[0], last > 0 ? RETURN_BELOW : rowSpan('reverse'));
  sheet.join(turned(longer(run, runOutM), corner), units[0], 'out');
}
