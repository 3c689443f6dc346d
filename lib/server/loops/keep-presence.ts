import { db } from '@/db/knex';
import type { DraftPresence } from '@/lib/api/loops';
import type { Access } from '../auth/authorize';

/** Three missed beats of a page that says so every 15 s. */
const COUNTS_FOR_SECONDS = 45;

/** Notes that the asker has the draft open, and answers who else has. By the database's clock, so that it holds across processes. */
export async function keepPresence({ person }: Access, loopId: string): Promise<DraftPresence> {
  const here = { organization_id: person.organizationId, loop_id: loopId };
  await db()('draft_presence')
    .insert({ ...here, person_id: person.id, seen_at: db().fn.now() })
    .onConflict(['organization_id', 'loop_id', 'person_id'])
    .merge(['seen_at']);
  const others = await db()('draft_presence')
    .join('people', (join) =>
      join.on('people.organization_id', 'draft_presence.organization_id').on('people.id', 'draft_presence.person_id'),
    )
    .where({ 'draft_presence.organization_id': person.organizationId, 'draft_presence.loop_id': loopId })
    .whereNot('draft_presence.person_id', person.id)
    .whereRaw('draft_presence.seen_at > now() - make_interval(secs => ?)', [COUNTS_FOR_SECONDS])
    .orderBy('people.name')
    .select<{ id: string; name: string }[]>('people.id', 'people.name');
  return { others };
}
