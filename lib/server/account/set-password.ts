import type { Knex } from 'knex';

/** Stores a new password. Every session that began before this moment ends (see `currentPerson`). */
export async function setPassword(trx: Knex, person: { organizationId: string; id: string }, passwordHash: string): Promise<void> {
  await trx('sign_ins')
    .where({ organization_id: person.organizationId, person_id: person.id })
    // The server's own clock, because sessions carry its time of sign-in.
    .update({ password_hash: passwordHash, password_changed_at: new Date() });
}
