import { recordReadingSchema } from '@/lib/api/commissioning';
import { answerCheckSchema, changeSettingSchema, photoSchema, raiseSnagSchema, resolveSnagSchema } from '@/lib/api/site';
import { z } from 'zod';

/** What can be entered on site without signal, as it goes to the server. A photo's picture lies beside it. */
const contentSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('reading'), roundId: z.uuid(), body: recordReadingSchema }),
  z.object({ kind: z.literal('setting'), roundId: z.uuid(), body: changeSettingSchema }),
  z.object({ kind: z.literal('check'), body: answerCheckSchema }),
  z.object({ kind: z.literal('snag'), body: raiseSnagSchema }),
  z.object({ kind: z.literal('resolution'), body: resolveSnagSchema }),
  z.object({ kind: z.literal('photo'), body: photoSchema, picture: z.instanceof(Blob) }),
]);

export const keptEntrySchema = z.object({
  /** That of the content: what the server stores it under. */
  id: z.uuid(),
  personId: z.uuid(),
  loopId: z.uuid(),
  /** Where it stands in the order of sending. */
  order: z.number(),
  /** What it was entered at, for the list of what waits. */
  tag: z.string(),
  /** Why the server does not take it; null while it only waits. */
  refusal: z.string().nullable(),
  content: contentSchema,
});

export type KeptEntry = z.infer<typeof keptEntrySchema>;
export type KeptContent = KeptEntry['content'];
export type KeptKind = KeptContent['kind'];
export type KeptOf<Kind extends KeptKind> = KeptEntry & { content: Extract<KeptContent, { kind: Kind }> };

export const isKept = <Kind extends KeptKind>(entry: KeptEntry, kind: Kind): entry is KeptOf<Kind> => entry.content.kind === kind;
