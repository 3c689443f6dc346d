import { z } from 'zod';

/** An error on the wire (RFC 9457): a code of the subject, a sentence for a person, and the fields at fault. */
export const problemSchema = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number(),
  code: z.string(),
  fields: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
  requestId: z.string().optional(),
  detail: z.unknown().optional(),
});
export type ProblemBody = z.infer<typeof problemSchema>;
