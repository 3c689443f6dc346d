import type { Drawing } from '@/lib/network/drawing';
import type { RowOf, ScheduleContext, ScheduleTable } from '@/lib/network/schedule-column';
import type { CellEdit, CellFault } from '@/lib/network/schedule-edits';
import type { Schedule } from '@/lib/network/schedule-rows';
import type { StripBand } from '@/lib/commissioning/flow-strip';

/** What the tables work on: the rows, and for one who may edit the ways to change them. */
export interface ScheduleDesk {
  schedule: Schedule;
  context: ScheduleContext;
  /** For files and headings: "CHW-1, draft". */
  title: string;
  personId: string;
  drawingHref: string;
  bands: { terminal: StripBand; branch: StripBand };
  /** The computed figures are those of an earlier state of the drawing. */
  isOld: boolean;
  selection: Selection;
  edit: Editing | null;
}

/** The pieces and pipes that are selected, on the Drawing and here alike. */
export interface Selection {
  equipment: ReadonlySet<string>;
  pipes: ReadonlySet<string>;
  select: (of: 'equipment' | 'pipes', ids: ReadonlySet<string>) => void;
}

export interface Editing {
  /** Changes all the cells in one step of the history, or none of them and says why. */
  apply: <Row extends RowOf<unknown>>(table: ScheduleTable<Row>, edits: readonly CellEdit[]) => CellFault[];
  undo: () => void;
  redo: () => void;
  canUndo: boolean;
  canRedo: boolean;
  /** Where a schedule can be brought in. */
  importHref: string;
}

export const isDrawingEmpty = ({ equipment, pipes }: Drawing): boolean => equipment.length === 0 && pipes.length === 0;
