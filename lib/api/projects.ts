import { z } from 'zod';
import type { StripBand, StripTick } from '@/lib/commissioning/flow-strip';
import type { LoopService, LoopState } from './loops';
import { projectRoles, type ProjectRole, type Role } from './permissions';

const text = z.string().trim().max(200);

export const memberSchema = z.object({ personId: z.uuid(), role: z.enum(projectRoles) });

export const createProjectSchema = z.object({
  name: text.min(1, 'A project needs a name.'),
  client: text,
  building: text,
  members: z.array(memberSchema).max(200),
});
export type CreateProject = z.infer<typeof createProjectSchema>;

export const stationKinds = ['terminal', 'branch', 'pump'] as const;
export type StationKind = (typeof stationKinds)[number];

/** What is told apart within a kind: the index terminal, terminals of little flow, valves of mains and risers. */
export const stationRanks = ['all', 'index', 'small', 'main'] as const;
export type StationRank = (typeof stationRanks)[number];

export const toleranceRuleSchema = z.object({
  stationKind: z.enum(stationKinds),
  rank: z.enum(stationRanks),
  lowerPercent: z.number().gt(-100, 'More than −100 %.').max(0, 'Zero or below.'),
  upperPercent: z.number().min(0, 'Zero or above.').max(100),
  source: text.min(1, 'Say where the band comes from.'),
});
export type ToleranceRule = z.infer<typeof toleranceRuleSchema>;

export const changeProjectSchema = z.object({
  name: text.min(1).optional(),
  client: text.optional(),
  building: text.optional(),
  members: z.array(memberSchema).max(200).optional(),
  /** All of them: one of a rank that is not named is taken away. */
  tolerances: z.array(toleranceRuleSchema).max(8).optional(),
});
export type ChangeProject = z.infer<typeof changeProjectSchema>;

export interface LoopSummary {
  id: string;
  name: string;
  service: LoopService;
  state: LoopState;
  revisionNumber: number | null;
  strip: StripTick[];
}

export interface ProjectSummary {
  id: string;
  name: string;
  client: string;
  building: string;
  roles: Role[];
  loops: LoopSummary[];
  /** Behind the strips of its loops. */
  band: StripBand;
}

export interface ProjectDetail extends ProjectSummary {
  members: { personId: string; name: string; email: string; role: ProjectRole }[];
  tolerances: ToleranceRule[];
}
