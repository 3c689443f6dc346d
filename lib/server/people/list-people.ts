import type { Knex } from 'knex';
import { db } from '@/db/knex';
import type { PersonRow } from '@/lib/api/people';

/** The people of an organisation, those still active first. */
export const listPeople = (organizationId: string): Promise<PersonRow[]> =>
  peopleRows(db(), organizationId).orderBy([
    { column: 'people.is_active', order: 'desc' },
    { column: 'people.name' },
    { column: 'people.id' },
  ]);

/** One person of the organisation, or undefined. */
export const findPerson = (connection: Knex, organizationId: string, personId: string): Promise<PersonRow | undefined> =>
  peopleRows(connection, organizationId).where('people.id', personId).first();

const peopleRows = (connection: Knex, organizationId: string) =>
  connection('people')
    .join('sign_ins', (join) => join.on('sign_ins.organization_id', 'people.organization_id').on('sign_ins.person_id', 'people.id'))
    .where('people.organization_id', organizationId)
    .select({
      id: 'people.id',
      name: 'people.name',
      email: 'people.email',
      isAdministrator: 'people.is_administrator',
      defaultRole: 'people.default_role',
      isActive: 'people.is_active',
      hasPassword: connection.raw('sign_ins.password_hash is not null'),
    });
