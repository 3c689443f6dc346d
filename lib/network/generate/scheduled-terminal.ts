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
  hasBranchValves: z.boolean(),
  hasMainValve: z.boolean(),
  pipeSeries: z.string().max(60),
  maxVelocityMs: z.number().positive().max(10),
  maxGradientPaM: z.number().positive().max(5000),
  /** Every balancing valve reads at least this at its design flow. */
  minReadingKpa: z.number().positive().max(100),
});

export type GenerateOptions = z.infer<typeof generateOptionsSchema>;
