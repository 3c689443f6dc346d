import { createHash, randomBytes } from 'node:crypto';
import type { Knex } from 'knex';
import { v7 as uuidv7 } from 'uuid';
import { db } from '@/db/knex';
import { publicLink } from '../mail/send-mail';
import { Problem } from '../problem';

export type LinkPurpose = 'invitation' | 'reset';

const hour = 3_600_000;
/** How long a link works, in milliseconds. */
const lifetimes: Record<LinkPurpose, number> = { invitation: 7 * 24 * hour, reset: hour };

/** Only the hash is kept: whoever reads the table cannot use a link. 256 random bits need no slow hash. */
const sha256 = (token: string): string => createHash('sha256').update(token).digest('hex');

/** Makes a link with which a person can set a password, once; the links made for them before stop working. */
export async function makePasswordLink(trx: Knex, person: { organizationId: string; id: string }, purpose: LinkPurpose): Promise<string> {
  const token = randomBytes(32).toString('base64url');
  await closeLinks(trx, person);
  await trx('password_links').insert({
    organization_id: person.organizationId,
    id: uuidv7(),
    person_id: person.id,
    purpose,
    token_sha256: sha256(token),
    expires_at: new Date(Date.now() + lifetimes[purpose]),
  });
  return publicLink(`/password?token=${token}`);
}

/** Ends every link of a person that still works. */
export async function closeLinks(trx: Knex, person: { organizationId: string; id: string }): Promise<void> {
  await trx('password_links')
    .where({ organization_id: person.organizationId, person_id: person.id })
    .whereNull('used_at')
    .update({ used_at: new Date() });
}

export interface OpenLink {
  organizationId: string;
  personId: string;
  purpose: LinkPurpose;
  name: string;
  email: string;
}

/**
 * The person of a link that still works, or null. The token comes before any organisation is known, so this is the one query
 * that finds its organisation by what it looks for.
 */
export async function findOpenLink(token: string): Promise<OpenLink | null> {
  const row = await db()('password_links')
    .join('people', (join) =>
      join.on('people.organization_id', 'password_links.organization_id').on('people.id', 'password_links.person_id'),
    )
    .where({ 'password_links.token_sha256': sha256(token), 'people.is_active': true })
    .whereNull('password_links.used_at')
    .where('password_links.expires_at', '>', new Date())
    .first({
      organizationId: 'people.organization_id',
      personId: 'people.id',
      purpose: 'password_links.purpose',
      name: 'people.name',
      email: 'people.email',
    });
  return row ?? null;
}

/** Takes a link out of use; of two who use it at once one is refused. */
export async function takeLink(trx: Knex, organizationId: string, token: string): Promise<void> {
  const taken = await trx('password_links')
    .where({ organization_id: organizationId, token_sha256: sha256(token) })
    .whereNull('used_at')
    .update({ used_at: new Date() });
  if (taken === 0) throw linkUsed();
}

export const linkUsed = () => new Problem('link-used', 'This link has been used or has run out. Ask for a new one.');
