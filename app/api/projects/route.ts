import { z } from 'zod';
import { createProjectSchema } from '@/lib/api/projects';
import { route } from '@/lib/server/http/route';
import { createProject } from '@/lib/server/projects/create-project';
import { listProjects } from '@/lib/server/projects/list-projects';

export const GET = route({
  permission: 'project.see',
  scope: 'organization',
  query: z.object({ q: z.string().max(200).optional() }),
  handle: ({ person, query }) => listProjects(person, query.q),
});

export const POST = route({
  permission: 'project.create',
  scope: 'organization',
  body: createProjectSchema,
  handle: ({ body, ...access }) => createProject(access, body),
});
