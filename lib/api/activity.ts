import { z } from 'zod';

export const activityQuerySchema = z.object({ projectId: z.uuid().optional(), before: z.iso.datetime({ offset: true }).optional() });

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
