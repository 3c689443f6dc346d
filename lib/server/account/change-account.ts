import { db } from '@/db/knex';
import type { ChangeAccount } from '@/lib/api/people';
import type { Person } from '../auth/person';

/** Changes one's own name, theme or units; what is left out stays. */
export async function changeAccount(person: Person, { name, theme, units }: ChangeAccount): Promise<void> {
  if (name === undefined && theme === undefined && units === undefined) return;
  await db()('people')
    .where({ organization_id: person.organizationId, id: person.id })
    .update({ name, theme, units: units && JSON.stringify(units) });
}
