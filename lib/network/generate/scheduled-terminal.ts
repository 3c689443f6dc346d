import { z } from 'zod';

/**
 * One row of a terminal schedule after its columns were mapped and its units converted: what a loop is generated from.
 * Quantities are SI in the unit that the name ends with.
 */
export const scheduledTerminalSchema = z.object({
  tag: z.string().trim().min(1).max(40),
  /** Name of the storey as the schedule writes it. */
  storey: z.string().trim().min(1).max(60),
  /** Name of the riser that feeds it; '' where the schedule has one riser and does not name it. */
  riser: z.string().trim().max(40),
  room: z.string().trim().max(200),
  loadKw: z.number().positive().max(1e5).nullable(),
  designFlowLs: z.number().positive().max(1e4),
  coilDropKpa: z.number().positive().max(1e3),
});

export type ScheduledTerminal = z.infer<typeof scheduledTerminalSchema>;

/** More rows than this are refused before anything is read. */
export const MAX_SCHEDULED_TERMINALS = 5000;

/** What the designer chooses before a loop is generated. */
export const generateOptionsSchema = z.object({
  returnPiping: z.enum(['direct', 'reverse']),
  /** m along the floor from one terminal to the next, and from the riser to the first. */
  terminalSpacingM: z.number().positive().max(100),
  /** m of supply or return pipe from the floor main to the terminal. */
  runOutM: z.number().positive().max(100),
  storeyHeightM: z.number().positive().max(50),
  /** m in the plant room from the pump to the first riser, and from riser to riser. */
  riserSpacingM: z.number().positive().max(500),
  /** A storey with more terminals on one riser is served by as many equal branches as keep each to this. */
  mostOnBranch: z.number().int().min(2).max(100),
  /** A balancing valve in the return of every branch, and of every riser where there are several. */
  hasBranchValves: z.boolean(),
  hasMainValve: z.boolean(),
  /** Drop of the chiller or boiler at design flow. */
  sourceDropKpa: z.number().positive().max(1000),
  pipeSeries: z.string().max(60),
  maxVelocityMs: z.number().positive().max(10),
  maxGradientPaM: z.number().positive().max(5000),
  /** Every balancing valve reads at least this at its design flow. */
  minReadingKpa: z.number().positive().max(100),
});

export type GenerateOptions = z.infer<typeof generateOptionsSchema>;
export type ReturnPiping = GenerateOptions['returnPiping'];

/** What the options begin with; the figures are common practice, no source. */
export const usualGenerateOptions: GenerateOptions = {
  returnPiping: 'direct',
  terminalSpacingM: 4.5,
  runOutM: 1.5,
  storeyHeightM: 4,
  riserSpacingM: 15,
  mostOnBranch: 20,
  hasBranchValves: true,
  hasMainValve: true,
  sourceDropKpa: 30,
  pipeSeries: 'steel-en10255-medium',
  maxVelocityMs: 1.2,
  maxGradientPaM: 250,
  minReadingKpa: 3,
};
