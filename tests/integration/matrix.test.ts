import { beforeAll, describe, expect, it } from 'vitest';
import { may, permissions, roles, type Permission, type Role } from '@/lib/api/permissions';
import { call } from '../make/call';
import { withDatabase } from '../make/database';
import { withFiles } from '../make/files';
import { withMail } from '../make/mail';
import { makeOrganization, type MadeOrganization } from '../make/organization';
import { makeRound, type MadeRound } from '../make/round';
import { signInAs } from '../make/session';
import { makeFiles, type MadeFiles } from '../make/stored-files';

/**
 * Every route handler × every role × another organisation × a person who is not on the project × signed out. A new
 * route is in here by existing; one without a declared permission fails.
 */

type Handler = ((request: Request, context: { params: Promise<Record<string, string>> }) => Promise<Response>) & {
  permission?: Permission | 'public';
  scope?: 'organization' | 'project' | 'loop' | 'round';
};

const methods = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE'] as const;
/** Not ours to declare: next-auth's own handler, and the health answer that says nothing of anybody. */
const undeclared = ['../../app/api/auth/[...nextauth]/route.ts', '../../app/api/health/route.ts'];

const modules = import.meta.glob<Record<string, Handler>>('../../app/api/**/route.ts', { eager: true });
const declared = Object.entries(modules)
  .filter(([path]) => !undeclared.includes(path))
  .flatMap(([path, module]) =>
    methods.flatMap((method) =>
      module[method]
        ? [{ name: `${method} ${path.replace('../../app', '').replace('/route.ts', '')}`, method, handler: module[method] }]
        : [],
    ),
  );
const guarded = declared.filter(({ handler }) => handler.permission !== 'public');

const suite = withDatabase();
withMail();
withFiles();
type MadePlace = MadeOrganization & MadeRound & MadeFiles;
let home: MadePlace;
let away: MadePlace;

beforeAll(async () => {
  const make = async (name: string) => {
    const organization = await makeOrganization(suite.db, { name });
    const round = await makeRound(suite.db, organization);
    return { ...organization, ...round, ...(await makeFiles({ ...organization, ...round })) };
  };
  home = await make('Home');
  away = await make('Away');
});

const paramsOf = (place: MadePlace): Record<string, string> => ({
  projectId: place.projectId,
  loopId: place.loopId,
  roundId: place.roundId,
  instrumentId: place.instrumentId,
  personId: place.outsider.id,
  stationId: place.stationId,
  photoId: place.photoId,
  certificateId: place.certificateId,
  number: '1',
});

it('finds the routes at all', () => {
  expect(guarded.length).toBeGreaterThan(10);
});

it('uses every permission of the table somewhere, so that none is a dead letter', () => {
  const used = new Set(declared.map(({ handler }) => handler.permission));
  const usedByPagesAlone = ['project.see', 'draft.see', 'people.see'];
  const dead = Object.keys(permissions).filter(
    (permission) => !used.has(permission as Permission) && !usedByPagesAlone.includes(permission),
  );
  expect(dead).toEqual([]);
});

describe.each(declared)('$name', ({ handler }) => {
  it('declares its permission', () => {
    expect(handler.permission).toBeDefined();
    expect(handler.permission === 'public' || Object.hasOwn(permissions, handler.permission!)).toBe(true);
  });
});

describe.each(guarded)('$name', ({ name, method, handler }) => {
  const body = method === 'GET' ? undefined : {};
  const send = (params: Record<string, string>) => call(handler, { method, params, body });
  const namesAnItem = name.includes('[');

  it('is refused to whoever is signed out', async () => {
    signInAs(null);
    expect((await send(paramsOf(home))).status).toBe(401);
  });

  it.each(roles)('answers a %s of the project as the table says', async (role: Role) => {
    signInAs(home[role]);
    const { status } = await send(paramsOf(home));
    const held: Role[] = role === 'administrator' && handler.scope === 'organization' ? ['administrator', 'owner'] : [role];
    if (may(held, handler.permission as Permission)) expect([200, 201, 400, 409, 410, 422]).toContain(status);
    else expect(status).toBe(403);
  });

  it.runIf(namesAnItem).each(roles)('tells a %s of another organisation that there is nothing', async (role: Role) => {
    signInAs(away[role]);
    const { status } = await send(paramsOf(home));
    const held: Role[] = role === 'administrator' ? ['administrator', 'owner'] : [role];
    // Where no project is named, the role is judged first: 403 then says nothing of what exists either.
    if (handler.scope === 'organization' && !may(held, handler.permission as Permission)) expect(status).toBe(403);
    else if (handler.scope === 'organization' && method !== 'GET') expect([400, 404]).toContain(status);
    else expect(status).toBe(404);
  });

  it.runIf(handler.scope !== 'organization')('tells a colleague who is not on the project that there is nothing', async () => {
    signInAs(home.outsider);
    expect((await send(paramsOf(home))).status).toBe(404);
  });

  it.runIf(namesAnItem)('answers an id that is none with 404, not with an error', async () => {
    signInAs(home.administrator);
    const nonsense = Object.fromEntries(Object.keys(paramsOf(home)).map((key) => [key, "'; drop table people; --"]));
    expect([400, 403, 404]).toContain((await send(nonsense)).status);
  });
});
