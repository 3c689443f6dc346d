import type { UnitChoice } from '@/lib/units/quantities';
import type { Drawing } from './drawing';
import { isRefusal, type CellValue, type RowOf, type ScheduleColumn, type ScheduleContext, type ScheduleTable } from './schedule-column';
import { readEntry } from './schedule-entry';
import { valveOfferOf, type OfferedValve } from './schedule-valve-offer';

/** One cell to be changed, by what was typed or by a stored value as another cell holds it. */
export type CellEdit = { id: string; key: string } & ({ text: string } | { value: CellValue });

/** A cell that cannot take what it was given. */
export interface CellFault {
  id: string;
  key: string;
  head: string;
  text: string;
  message: string;
}

export type EditedDrawing = { ok: true; drawing: Drawing } | { ok: false; faults: CellFault[] };

/**
 * The drawing with all the cells changed, or every fault and no change at all. The cells of a row are taken in the order of
 * the columns, since one decides what the next may hold (a series of pipes, its sizes). `catalogue` are valves to choose from besides
 * those of the drawing and the generic ones.
 */
export function applyEdits<Row extends RowOf<unknown>>(
  drawing: Drawing,
  table: ScheduleTable<Row>,
  edits: readonly CellEdit[],
  units: UnitChoice,
  catalogue: readonly OfferedValve[] = [],
): EditedDrawing {
  const context: ScheduleContext = { valves: valveOfferOf(drawing, catalogue) };
  const order = new Map(table.columns.map(({ key }, index) => [key, index]));
  const byRow = new Map<string, CellEdit[]>();
  for (const edit of edits) {
    const its = byRow.get(edit.id);
    if (its) its.push(edit);
    else byRow.set(edit.id, [edit]);
  }
  const faults: CellFault[] = [];
  const changed = <Item extends { id: string }>(item: Item): Item => {
    const its = byRow.get(item.id);
    if (!its) return item;
    byRow.delete(item.id);
    const inOrder = [...its].sort((a, b) => (order.get(a.key) ?? 0) - (order.get(b.key) ?? 0));
    return inOrder.reduce<Item>((before, edit) => {
      const column = table.columns[order.get(edit.key) ?? -1];
      const written = column ? writeCell(column, before, edit, { units, context }) : { refused: 'There is no such column.' };
      if (!isRefusal(written)) return written as Item;
      const text = 'text' in edit ? edit.text : String(edit.value ?? '');
      faults.push({ id: item.id, key: edit.key, head: column?.head ?? edit.key, text, message: written.refused });
      return before;
    }, item);
  };
  const next =
    table.of === 'pipes' ? { ...drawing, pipes: drawing.pipes.map(changed) } : { ...drawing, equipment: drawing.equipment.map(changed) };
  for (const [id, its] of byRow) {
    for (const { key } of its) faults.push({ id, key, head: key, text: '', message: 'It is no longer on the drawing.' });
  }
  return faults.length ? { ok: false, faults } : { ok: true, drawing: next };
}

function writeCell<Row extends RowOf<unknown>>(
  column: ScheduleColumn<Row>,
  item: Row['item'],
  edit: CellEdit,
  { units, context }: { units: UnitChoice; context: ScheduleContext },
) {
  if (!column.write) return { refused: `${column.head} is not typed here: it follows from the drawing.` };
  if ('value' in edit) {
    const isChoosable = column.kind !== 'choice' || column.options(item, context).some(([value]) => value === edit.value);
    return isChoosable ? column.write(item, edit.value, context) : { refused: `It cannot be ${String(edit.value ?? 'empty')} here.` };
  }
  const read = readEntry(column, item, edit.text, { units, context });
  return read.ok ? column.write(item, read.value, context) : { refused: read.message };
}
