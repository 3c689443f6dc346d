import type { PersonRow } from '@/lib/api/people';
import { PersonActions } from './person-actions';
import { roleWords } from './role-words';

/** Everybody of the organisation, one row a person. */
export function PeopleList({ people, mayManage }: { people: PersonRow[]; mayManage: boolean }) {
  return (
    <ul className="bg-sheet divide-y rounded border">
      {people.map((person) => (
        <li key={person.id} className="flex min-h-16 items-center gap-x-4 px-4 py-2">
          <div className="grid min-w-0 flex-1 gap-x-4 sm:grid-cols-[minmax(0,3fr)_minmax(0,2fr)_minmax(0,2fr)] sm:items-center">
            <div className="min-w-0">
              <p className={person.isActive ? 'truncate font-semibold' : 'text-quiet truncate font-semibold line-through'}>{person.name}</p>
              <p className="text-quiet truncate text-sm">{person.email}</p>
            </div>
            <p className="text-sm sm:text-base">
              {roleWords[person.defaultRole]}
              {person.isAdministrator && <span className="text-brass"> · Administrator</span>}
            </p>
            <p className="text-quiet text-sm sm:text-right">{standing(person)}</p>
          </div>
          {mayManage && <PersonActions person={person} />}
        </li>
      ))}
    </ul>
  );
}

function standing({ isActive, hasPassword }: PersonRow): string {
  if (!isActive) return 'Shut out';
  return hasPassword ? '' : 'Invited, not yet here';
}
