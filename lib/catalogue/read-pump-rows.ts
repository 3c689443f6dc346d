import { pumpColumns, readFigure, type PumpCell } from './figure-columns';
import { faultsOfPumpPoints, type PumpPoint } from './pump-points';
import type { CellFault } from './read-valve-rows';

/** The points of a pump from the rows of its table, in the order of flow, and every cell that stands in the way. */
export function readPumpRows(
  rows: readonly (readonly string[])[],
  units: Record<string, string>,
): { points: PumpPoint[]; faults: CellFault<PumpCell>[] } {
  const faults: CellFault<PumpCell>[] = [];
  const lines: { row: number; point: PumpPoint }[] = [];
  rows.forEach((cells, row) => {
    if (cells.every((cell) => cell.trim() === '')) return;
    const point: Record<PumpCell, number | null> = { flowLs: null, headM: null, efficiency: null, suctionHeadM: null };
    pumpColumns.forEach((column, index) => {
      const text = cells[index]?.trim() ?? '';
      const read = text === '' ? null : readFigure(column, text, units[column.key] ?? '');
      if (read?.ok) point[column.key] = read.value;
      else if (read) faults.push({ row, column: column.key, message: read.message });
      else if (column.isRequired) faults.push({ row, column: column.key, message: `${column.label} is missing.` });
    });
    const { flowLs, headM } = point;
    if (flowLs !== null && headM !== null) lines.push({ row, point: { ...point, flowLs, headM } });
  });
  lines.sort((a, b) => a.point.flowLs - b.point.flowLs);
  const points = lines.map(({ point }) => point);
  // A line that could not be read is said first: without it the rest is another curve.
  if (faults.length === 0) {
    faults.push(...faultsOfPumpPoints(points).map(({ index, column, message }) => ({ row: lines[index]?.row ?? 0, column, message })));
    faults.push(...fractionsReadAsPercent(lines, units));
  }
  return { points, faults: faults.sort((a, b) => a.row - b.row) };
}

function fractionsReadAsPercent(lines: { row: number; point: PumpPoint }[], units: Record<string, string>): CellFault<PumpCell>[] {
  if (units.efficiency !== '%') return [];
  const given = lines.filter(({ point }) => point.efficiency !== null && point.efficiency > 0);
  if (given.length === 0 || given.some(({ point }) => point.efficiency! > 0.01)) return [];
  return [
    {
      row: given[0]!.row,
      column: 'efficiency',
      message: 'All efficiencies are below 1 %. If they are fractions, choose “fraction” above the column.',
    },
  ];
}
