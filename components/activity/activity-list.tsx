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
            <span className="font-semibold">{row.personName}</span> {row.verb} <Subject row={row} />
            <Place row={row} hasProject={hasProject} />
          </p>
          <Moment at={row.at} className="figures text-quiet text-xs whitespace-nowrap" />
        </li>
      ))}
    </ol>
  );
}

/** A page of links would be louder than what was done. */
const inInk = 'text-ink no-underline hover:underline';
const inQuiet = 'text-quiet no-underline hover:underline';

const namesLoop = ({ subject, loopName }: ActivityRow) => Boolean(loopName && subject.includes(loopName));

/** What was acted on; leads to the loop or project that it names. */
function Subject({ row }: { row: ActivityRow }) {
  const { projectId, loopId, projectName, subject } = row;
  if (projectId && loopId && namesLoop(row))
    return (
      <Link className={inInk} href={`/projects/${projectId}/loops/${loopId}`}>
        {subject}
      </Link>
    );
  if (projectId && subject === projectName)
    return (
      <Link className={inInk} href={`/projects/${projectId}`}>
        {subject}
      </Link>
    );
  return subject;
}

/** Where it was, as far as the subject does not say so. */
function Place({ row, hasProject }: { row: ActivityRow; hasProject?: boolean }) {
  const { projectId, projectName, loopId, loopName, subject } = row;
  if (!projectId || !projectName) return null;
  const loop = loopId && loopName && !namesLoop(row) && (
    <Link className={inQuiet} href={`/projects/${projectId}/loops/${loopId}`}>
      {loopName}
    </Link>
  );
  const project = hasProject && projectName !== subject && (
    <Link className={inQuiet} href={`/projects/${projectId}`}>
      {projectName}
    </Link>
  );
  if (!loop && !project) return null;
  return (
    <span className="text-quiet">
      {' · '}
      {project}
      {loop && project && ' / '}
      {loop}
    </span>
  );
}
