import type { ProjectDetail } from '@/lib/api/projects';
import { roleWords } from '../people/role-words';

/** Who is on the project; a person with two roles has two lines. */
export function MemberList({ members }: { members: ProjectDetail['members'] }) {
  if (members.length === 0) return <p className="text-quiet">Nobody is on it yet.</p>;
  return (
    <ul className="divide-y">
      {members.map(({ personId, name, email, role }) => (
        <li key={`${personId} ${role}`} className="flex items-baseline justify-between gap-3 py-1.5">
          <span className="min-w-0 truncate" title={email}>
            {name}
          </span>
          <span className="text-quiet text-sm">{roleWords[role]}</span>
        </li>
      ))}
    </ul>
  );
}
