import Link from 'next/link';
import type { ActivityRow } from '@/lib/api/activity';
import { Moment } from '../ui/moment';

/** Who did what, a line each; `hasProject` names the project where several are mixed. */
export function ActivityList({ rows, hasProject }: { rows: ActivityRow[]; hasProject?: boolean }) {
  return (
    <ol className="divide-y">
      {rows.map((row) => (
        <li key={row.id} className="flex flex-wrap items-baseline justify-between gap-x-6 px-4 py-2.5">
          <p className="min-w-0">
            <span className="font-semibold">{row.personName}</span> {row.verb} {row.subject}
            <Place row={row} hasProject={hasProject} />
          </p>
          <Moment at={row.at} className="figures text-xs whitespace-nowrap text-quiet" />
        </li>
      ))}
    </ol>
  );
}

function Place({ row, hasProject }: { row: ActivityRow; hasProject?: boolean }) {
  const { projectId, projectName, loopId, loopName, subject } = row;
  if (!projectId || !projectName) return null;
  const isLoopNamed = loopId && loopName && loopName !== subject;
  const isProjectNamed = hasProject && projectName !== subject;
  if (!isLoopNamed && !isProjectNamed) return null;
  return (
    <span className="text-quiet">
      {' · '}
      {isProjectNamed && <Link href={`/projects/${projectId}`}>{projectName}</Link>}
      {isLoopNamed && isProjectNamed && ' / '}
      {isLoopNamed && <Link href={`/projects/${projectId}/loops/${loopId}`}>{loopName}</Link>}
    </span>
  );
}
