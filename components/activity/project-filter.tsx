'use client';

import { useRouter } from 'next/navigation';
import { SelectField } from '../ui/field';

/** Which project's record is shown; stands in the address. */
export function ProjectFilter({ projects, projectId }: { projects: { id: string; name: string }[]; projectId?: string }) {
  const router = useRouter();
  return (
    <SelectField
      label="Project"
      // Begins anew with the address, and keeps the choice while the page is on its way.
      key={projectId}
      defaultValue={projectId ?? ''}
      onChange={(event) => router.replace(event.target.value ? `/activity?project=${event.target.value}` : '/activity', { scroll: false })}
      className="bg-sheet"
    >
      <option value="">All projects</option>
      {projects.map(({ id, name }) => (
        <option key={id} value={id}>
          {name}
        </option>
      ))}
    </SelectField>
  );
}
