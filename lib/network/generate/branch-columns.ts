import { columnsOf, type Cell, type CellJoint } from './elk-columns';
import { RETURN_BELOW, RISER_GAP, rowSpan, rowTop, UNIT_INSET } from './measures';
import type { ReturnPiping } from './scheduled-terminal';

/** What the branches of one riser on one storey need on the sheet. */
export interface BranchShape {
  units: number;
  hasValve: boolean;
}

/** Where the pieces of one branch stand, as distances right of the supply riser. */
export interface BranchPlaces {
  units: number[];
  valve: number | null;
  /** Where a reverse return turns back. */
  turn: number;
}

const VALVE_WIDTH = 80;
const TURN_WIDTH = 20;
const VALVE_INSET = VALVE_WIDTH / 2;

/** Columns for the branches of one riser on one storey, the same for the same shapes. */
export class BranchColumns {
  private readonly known = new Map<string, Promise<BranchPlaces[]>>();

  constructor(
    private readonly returnPiping: ReturnPiping,
    private readonly unitWidth: number,
  ) {}

  of(branches: BranchShape[]): Promise<BranchPlaces[]> {
    const key = JSON.stringify(branches);
    const places = this.known.get(key) ?? this.find(branches);
    this.known.set(key, places);
    return places;
  }

  private async find(branches: BranchShape[]): Promise<BranchPlaces[]> {
    const height = rowSpan(this.returnPiping);
    const isReverse = this.returnPiping === 'reverse';
    const back = isReverse ? 'back' : 'return';
    const lines: Record<string, number> = isReverse
      ? { supply: 0, return: RETURN_BELOW, back: height }
      : { supply: 0, return: RETURN_BELOW };
    const top = (row: number) => rowTop(row, this.returnPiping) - rowTop(0, this.returnPiping);
    const riser: Cell = { id: 'riser', width: RISER_GAP, height: top(branches.length - 1) + height, lines: {} };
    const cells: Cell[] = [riser];
    const joints: CellJoint[] = [];
    branches.forEach(({ units, hasValve }, row) => {
      riser.lines[`supply ${row}`] = top(row);
      riser.lines[`back ${row}`] = top(row) + height;
      let [before, supply, its] = ['riser', `supply ${row}`, `back ${row}`];
      const stand = (id: string, width: number) => {
        cells.push({ id, width, height, lines });
        joints.push([before, supply, id, 'supply'], [before, its, id, back]);
        if (isReverse && before.startsWith('unit')) joints.push([before, 'return', id, 'return']);
        [before, supply, its] = [id, 'supply', back];
      };
      if (hasValve) stand(`valve ${row}`, VALVE_WIDTH);
      for (let k = 0; k < units; k++) stand(`unit ${row} ${k}`, this.unitWidth);
      if (isReverse) stand(`turn ${row}`, TURN_WIDTH);
    });
    const corner = await columnsOf(cells, joints);
    return branches.map(({ units, hasValve }, row) => {
      const unitsAt = Array.from({ length: units }, (_, k) => corner.get(`unit ${row} ${k}`)!.x + UNIT_INSET);
      const turn = corner.get(`turn ${row}`)?.x ?? unitsAt.at(-1)!;
      return { units: unitsAt, valve: hasValve ? corner.get(`valve ${row}`)!.x + VALVE_INSET : null, turn };
    });
  }
}
