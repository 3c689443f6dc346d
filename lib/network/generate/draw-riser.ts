import { BranchColumns } from './branch-columns';
import type { Riser } from './building';
import { drawBranch } from './draw-branch';
import type { LoopChoices } from './loop-choices';
import { RISER_GAP, rowSpan, rowTop } from './measures';
import { longer, turned, type Run, type Sheet } from './sheet';
import type { Storey } from '../drawing';

/** Between branches that leave a riser on the same storey. */
const BESIDE_M = 0.5;

/** What the riser's places on the sheet follow from: the bands of the storeys, the lowest first, and the columns of its branches. */
export interface RiserSheet {
  storeys: Storey[];
  columns: BranchColumns;
  /** The supply riser's. */
  x: number;
}

const hasBranchValve = (units: unknown[], { options }: LoopChoices) => options.hasBranchValves && units.length > 1;

/** The shapes of a floor's branches, for their columns. */
export const shapesOf = (branches: unknown[][], choices: LoopChoices) =>
  branches.map((units) => ({ units: units.length, hasValve: hasBranchValve(units, choices) }));

/** A pair of risers from the plant room up, supply on the left, with the branches of each storey to the right. Reading order is top to bottom; water meets the lowest first. */
export async function drawRiser(sheet: Sheet, supply: Run, back: Run, riser: Riser, at: RiserSheet, choices: LoopChoices): Promise<void> {
  const { returnPiping, storeyHeightM } = choices.options;
  const { storeys, columns, x } = at;
  let [up, down] = [supply, back];
  let below = -1;
  for (const [f, { storey, branches }] of riser.floors.entries()) {
    const band = storeys[storey];
    const places = await columns.of(shapesOf(branches, choices));
    for (let row = branches.length - 1; row >= 0; row--) {
      const riseM = row === branches.length - 1 ? (storey - below) * storeyHeightM : BESIDE_M;
      [up, down] = [longer(up, riseM), longer(down, riseM)];
      const start = { storeyId: band.id, x, y: band.top + rowTop(row, returnPiping) };
      const end = { ...start, x: x + RISER_GAP, y: start.y + rowSpan(returnPiping) };
      const number = branches.length > 1 ? `.${row + 1}` : '';
      const branch = {
        terminals: branches[row],
        places: places[row],
        start,
        valveTag: `BV-${levelMark(band, storey)}${riser.name.slice(0, 12)}${number}`,
      };
      if (f === riser.floors.length - 1 && row === 0) {
        drawBranch(sheet, turned(up, start), turned(down, end), branch, choices);
        return;
      }
      const [supplyTee, returnTee] = [sheet.tee(start), sheet.tee(end)];
      sheet.join(up, supplyTee, 's');
      sheet.join(down, returnTee, 's');
      const off = (tee: string, circuit: Run['circuit']) => longer(sheet.begin(tee, 'e', circuit), 0, 'tee-branch');
      drawBranch(sheet, off(supplyTee, 'supply'), off(returnTee, 'return'), branch, choices);
      up = longer(sheet.begin(supplyTee, 'n', 'supply'), 0, 'tee-run');
      down = longer(sheet.begin(returnTee, 'n', 'return'), 0, 'tee-run');
    }
    below = storey;
  }
}

/** The number in a storey's name, or its place counted from the lowest, which is 1. */
const levelMark = ({ name }: Storey, storey: number) => name.match(/-?\d+/)?.[0] ?? String(storey + 1);
