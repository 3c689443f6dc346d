'use client';

import { Plus, X } from 'lucide-react';
import type { PersonRow } from '@/lib/api/people';
import { projectRoles, type ProjectRole } from '@/lib/api/permissions';
import { roleWords } from '../people/role-words';
import { Button } from '../ui/button';
import { inputClass } from '../ui/field';

export interface Member {
  personId: string;
  role: ProjectRole;
}

interface MemberFieldsProps {
  members: Member[];
  onChange: (members: Member[]) => void;
  /** Whom one can put on the project; those who are on it are listed even when they are shut out by now. */
  people: Pick<PersonRow, 'id' | 'name' | 'defaultRole'>[];
}

/** Who is on a project and as what: a row each, another at the end. */
export function MemberFields({ members, onChange, people }: MemberFieldsProps) {
  const change = (index: number, part: Partial<Member>) =>
    onChange(members.map((member, i) => (i === index ? { ...member, ...part } : member)));
  const next = people.find(({ id }) => !members.some(({ personId }) => personId === id)) ?? people[0];
  return (
    <fieldset className="flex flex-col gap-2">
      <legend className="mb-1 text-sm font-semibold">Members</legend>
      {members.map((member, index) => (
        <div key={index} className="flex gap-2">
          <select
            aria-label={`Member ${index + 1}`}
            className={`${inputClass} h-10 flex-1`}
            value={member.personId}
            onChange={(event) => {
              const person = people.find(({ id }) => id === event.target.value);
              if (person) change(index, { personId: person.id, role: person.defaultRole });
            }}
          >
            {people.map(({ id, name }) => (
              <option key={id} value={id}>
                {name}
              </option>
            ))}
          </select>
          <select
            aria-label={`Role of member ${index + 1}`}
            className={`${inputClass} h-10 w-36!`}
            value={member.role}
            onChange={(event) => change(index, { role: projectRoles.find((role) => role === event.target.value) })}
          >
            {projectRoles.map((role) => (
              <option key={role} value={role}>
                {roleWords[role]}
              </option>
            ))}
          </select>
          <Button
            look="quiet"
            className="w-10 shrink-0 px-0!"
            aria-label={`Take member ${index + 1} off`}
            onClick={() => onChange(members.filter((_, i) => i !== index))}
          >
            <X size={16} aria-hidden />
          </Button>
        </div>
      ))}
      {next && (
        <Button
          look="quiet"
          size="small"
          className="self-start"
          onClick={() => onChange([...members, { personId: next.id, role: next.defaultRole }])}
        >
          <Plus size={16} aria-hidden /> Add a member
        </Button>
      )}
    </fieldset>
  );
}
