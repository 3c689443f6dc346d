import type { Knex } from 'knex';
import { v7 as uuidv7 } from 'uuid';

interface Doer {
  person: { organizationId: string; id: string; name: string };
  projectId: string | null;
}

interface Deed {
  /** Past tense, as the activity page shows it: "issued", "recorded a reading at". */
  verb: string;
  subject: string;
  projectId?: string | null;
  loopId?: string | null;
  detail?: Record<string, unknown>;
}

/** Writes down who did what, in the transaction that did it. */
export async function recordActivity(trx: Knex.Transaction, { person, projectId }: Doer, deed: Deed): Promise<void> {
  await trx('activity').insert({
    organization_id: person.organizationId,
    id: uuidv7(),
    project_id: deed.projectId ?? projectId,
    loop_id: deed.loopId ?? null,
    person_id: person.id,
    person_name: person.name,
    verb: deed.verb,
    subject: deed.subject,
    detail: JSON.stringify(deed.detail ?? {}),
  });
}
