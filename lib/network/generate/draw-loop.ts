import { v7 as newId } from 'uuid';
import type { Storey } from '../drawing';
import { BranchColumns } from './branch-columns';
import { flowOfRiser, type Building, type Riser } from './building';
import { chooseBalancingValve } from './balancing-valve-choice';
import { drawPlant } from './draw-plant';
import { drawRiser, shapesOf } from './draw-riser';
import type { LoopChoices } from './loop-choices';
import { bandHeight, BLOCK_GAP, MAIN_RETURN, MAIN_SUPPLY, PLANT_HEIGHT, RISER_GAP, UNIT_INSET, unitWidth } from './measures';
import { longer, Sheet, turned, type Run, type Spot } from './sheet';

/** Between a riser's valve and the main. */
const TO_MAIN_M = 0.5;

/** The pieces and pipes of a building's loop, pipes without sizes: the plant room at the bottom left, its mains to the right, risers up from them. */
export async function drawLoop(building: Building, choices: LoopChoices): Promise<{ sheet: Sheet; storeys: Storey[] }> {
  const { returnPiping, riserSpacingM, storeyHeightM } = choices.options;
  const terminals = building.risers.flatMap(({ floors }) => floors.flatMap(({ branches }) => branches.flat()));
  const sheet = new Sheet(new Set(terminals.map(({ tag }) => tag)));
  const unit = unitWidth(Math.max(...terminals.map(({ tag }) => tag.length)));
  const columns = new BranchColumns(returnPiping, unit);
  const { plant, above } = bandsOf(building, choices);
  const flowLs = Number(building.risers.reduce((sum, riser) => sum + flowOfRiser(riser), 0).toFixed(6));
  const made = await drawPlant(sheet, plant, flowLs, building.storeys.length * storeyHeightM, choices);

  let x = made.width;
  let [supply, back] = [made.supply, made.back];
  for (const [r, riser] of building.risers.entries()) {
    [supply, back] = [longer(supply, riserSpacingM), longer(back, riserSpacingM)];
    const at = (right: number, below: number): Spot => ({ storeyId: plant.id, x: x + right, y: plant.top + below });
    let up: Run;
    let down: Run;
    if (r < building.risers.length - 1) {
      const [supplyTee, returnTee] = [sheet.tee(at(0, MAIN_SUPPLY)), sheet.tee(at(RISER_GAP, MAIN_RETURN))];
      sheet.join(supply, supplyTee, 'w');
      sheet.join(back, returnTee, 'w');
      up = longer(sheet.begin(supplyTee, 'n', 'supply'), 0, 'tee-branch');
      down = longer(sheet.begin(returnTee, 'n', 'return'), 0, 'tee-branch');
      supply = longer(sheet.begin(supplyTee, 'e', 'supply'), 0, 'tee-run');
      back = longer(sheet.begin(returnTee, 'e', 'return'), 0, 'tee-run');
    } else {
      up = turned(supply, at(0, MAIN_SUPPLY));
      down = turned(back, at(RISER_GAP, MAIN_RETURN));
    }
    if (hasRiserValve(riser, building, choices)) {
      const valve = chooseBalancingValve(flowOfRiser(riser), choices.valves);
      const spot = at(RISER_GAP, (MAIN_SUPPLY + MAIN_RETURN) / 2);
      const name = riser.name ? `BV-R${riser.name.slice(0, 12)}` : undefined;
      const id = sheet.add({ ...sheet.placed(spot, sheet.tag('BV', name), 90), kind: 'balancingValve', valve });
      sheet.join(longer(down, TO_MAIN_M), id, 'out');
      down = sheet.begin(id, 'in', 'return');
    }
    await drawRiser(sheet, up, down, riser, { storeys: above, columns, x }, choices);
    const widths = await Promise.all(
      riser.floors.map(async ({ branches }) => {
        const places = await columns.of(shapesOf(branches, choices));
        return Math.max(...places.map(({ units, turn }) => Math.max(turn, units.at(-1)! - UNIT_INSET + unit)));
      }),
    );
    x += Math.max(...widths) + BLOCK_GAP;
  }
  return { sheet, storeys: [...above.toReversed(), plant] };
}

/** A riser of one branch has that branch's valve. */
const hasRiserValve = ({ floors }: Riser, { risers }: Building, { options }: LoopChoices) =>
  options.hasBranchValves && risers.length > 1 && floors.reduce((sum, { branches }) => sum + branches.length, 0) > 1;

/** The bands of the sheet, from the highest storey down to the plant room; `above` counts from the lowest storey. */
function bandsOf({ storeys, risers }: Building, { options }: LoopChoices): { plant: Storey; above: Storey[] } {
  const rows = storeys.map((_, storey) =>
    Math.max(...risers.flatMap(({ floors }) => floors.filter((floor) => floor.storey === storey).map(({ branches }) => branches.length))),
  );
  const above: Storey[] = [];
  let top = 0;
  for (let storey = storeys.length - 1; storey >= 0; storey--) {
    const height = bandHeight(rows[storey], options.returnPiping);
    above[storey] = { id: newId(), name: storeys[storey], elevationM: (storey + 1) * options.storeyHeightM, top, height };
    top += height;
  }
  const name = storeys.some((storey) => storey.toLowerCase() === 'plant room') ? 'Pumps and source' : 'Plant room';
  return { plant: { id: newId(), name, elevationM: 0, top, height: PLANT_HEIGHT }, above };
}
