import type { ReturnPiping } from './scheduled-terminal';

/**
 * How a generated loop stands on the sheet, in drawing units: storeys are bands, risers are upright, a branch is a row of terminal units
 * between its supply line above and its return line below. All are multiples of the grid.
 */

/** The return riser stands this far right of the supply riser. */
export const RISER_GAP = 60;
/** Between the last unit of one riser's branches and the next riser. */
export const BLOCK_GAP = 120;
/** From the supply line of a branch down to the middle of its units, to its return line and to the line on which a reverse return runs back. */
export const UNIT_BELOW = 105;
export const RETURN_BELOW = 210;
export const RUN_BACK_BELOW = 260;
/** From a band's upper edge to the first supply line, and from its last line to its lower edge. */
export const BAND_HEAD = 50;
export const BAND_FOOT = 60;
/** Between the last line of one branch and the supply line of the next one below it. */
export const ROW_GAP = 80;
export const PLANT_HEIGHT = 320;
/** From the plant room's upper edge to its supply and return mains. */
export const MAIN_SUPPLY = 80;
export const MAIN_RETURN = 220;
/** Where a terminal unit stands in its cell; its figures and its tag are written to its right. */
export const UNIT_INSET = 30;

/** The height of one branch from its supply line to its last line. */
export const rowSpan = (returnPiping: ReturnPiping): number => (returnPiping === 'reverse' ? RUN_BACK_BELOW : RETURN_BELOW);

/** The supply line of a row, from the band's upper edge. */
export const rowTop = (row: number, returnPiping: ReturnPiping): number => BAND_HEAD + row * (rowSpan(returnPiping) + ROW_GAP);

/** A band that holds so many rows. */
export const bandHeight = (rows: number, returnPiping: ReturnPiping): number =>
  rowTop(rows - 1, returnPiping) + rowSpan(returnPiping) + BAND_FOOT;

/** Width of one unit with its words: a tag of 11 px takes about 6.5 a letter. Long tags run under the next unit's rather than tear the row apart. */
export const unitWidth = (longestTag: number): number =>
  Math.min(200, Math.max(100, 20 * Math.ceil((UNIT_INSET + 20 + 6.5 * longestTag) / 20)));
