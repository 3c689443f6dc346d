import { changeProjectSchema } from '@/lib/api/projects';
import { route } from '@/lib/server/http/route';
import { changeProject } from '@/lib/server/projects/change-project';
import { readProject } from '@/lib/server/projects/read-project';

export const GET = route({
  permission: 'project.see',
  scope: 'project',
  handle: ({ params, ...access }) => readProject(access, params.projectId!),
});

export const PATCH = route({
  permission: 'project.manage',
  scope: 'project',
  body: changeProjectSchema,
  handle: ({ params, body, ...access }) => changeProject(access, params.projectId!, body),
});
