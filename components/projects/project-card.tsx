import Link from 'next/link';
import type { ProjectSummary } from '@/lib/api/projects';
import { LoopList } from './loop-list';

/** A project in the list, with its loops under it. */
export function ProjectCard({ project }: { project: ProjectSummary }) {
  const about = [project.client, project.building].filter(Boolean).join(' · ');
  return (
    <section aria-label={project.name} className="bg-sheet overflow-hidden rounded border">
      <div className="flex flex-wrap items-baseline justify-between gap-x-4 border-b px-4 py-3">
        <h2 className="min-w-0">
          <Link href={`/projects/${project.id}`} className="text-ink no-underline hover:underline">
            {project.name}
          </Link>
        </h2>
        <p className="text-quiet min-w-0 truncate text-sm">{about}</p>
      </div>
      {project.loops.length ? (
        <LoopList projectId={project.id} loops={project.loops} band={project.band} />
      ) : (
        <p className="text-quiet px-4 py-3 text-sm">No loop yet.</p>
      )}
    </section>
  );
}
