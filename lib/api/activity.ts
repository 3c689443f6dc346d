import { z } from 'zod';

/** GET /api/activity — `before` is the id of the oldest row already shown. */
export const activityQuerySchema = z.object({ projectId: z.uuid().optional(), before: z.uuid().optional() });

export interface ActivityRow {
  id: string;
  personName: string;
  verb: string;
  subject: string;
  projectId: string | null;
  projectName: string | null;
  loopId: string | null;
  loopName: string | null;
  at: string;
}

export interface ActivityPage {
  /** Newest first. */
  rows: ActivityRow[];
  hasMore: boolean;
}
