import { v7 as uuidv7 } from 'uuid';
import { z } from 'zod';
import type { Permission } from '@/lib/api/permissions';
import { authorize, type Access, type Scope } from '../auth/authorize';
import { currentPerson } from '../auth/person';
import { log } from '../log';
import { Problem } from '../problem';

type Params = Record<string, string>;

interface Declaration<Body, Query> {
  /** Stands in the route's own declaration; the matrix test reads it. */
  permission: Permission;
  scope: Scope['kind'];
  body?: z.ZodType<Body>;
  query?: z.ZodType<Query>;
  /** Largest request body in bytes; drawings are the largest that anybody sends. */
  maxBytes?: number;
  /** The body is a file, handed over as its bytes; more than this are refused. */
  upload?: { maxBytes: number };
  handle: (input: Access & { params: Params; body: Body; query: Query; upload: Buffer; request: Request }) => Promise<unknown>;
}

/** What the matrix test asks of a route handler. */
export interface DeclaredRoute {
  (request: Request, context: { params: Promise<Params> }): Promise<Response>;
  permission: Permission;
  scope: Scope['kind'];
}

const scopeParameter = { project: 'projectId', loop: 'loopId', round: 'roundId' } as const;

/**
 * Wraps a route handler so that none of it can be forgotten: who asks, may they, is the input well-formed, one call,
 * one answer; every refusal as problem+json, every surprise logged under a request id that the answer carries.
 */
export function route<Body = undefined, Query = undefined>(declaration: Declaration<Body, Query>): DeclaredRoute {
  const handler = async (request: Request, context: { params: Promise<Params> }): Promise<Response> => {
    const requestId = uuidv7();
    try {
      refuseForeignOrigin(request);
      const person = await currentPerson();
      if (!person) throw new Problem('signed-out', 'You are not signed in, or your session has ended. Sign in again.');
      refuseOtherPerson(request, person.id);
      const params = await context.params;
      const scope: Scope =
        declaration.scope === 'organization'
          ? { kind: 'organization' }
          : { kind: declaration.scope, id: params[scopeParameter[declaration.scope]] ?? '' };
      const access = await authorize(person, declaration.permission, scope);
      const body = (
        declaration.body ? declaration.body.parse(await readJson(request, declaration.maxBytes ?? 1 << 20)) : undefined
      ) as Body;
      const query = (
        declaration.query ? declaration.query.parse(Object.fromEntries(new URL(request.url).searchParams)) : undefined
      ) as Query;
      const upload = declaration.upload ? await readBytes(request, declaration.upload.maxBytes) : Buffer.alloc(0);
      return answer(await declaration.handle({ ...access, params, body, query, upload, request }));
    } catch (error) {
      return refusal(error, requestId);
    }
  };
  return Object.assign(handler, { permission: declaration.permission, scope: declaration.scope });
}

const answer = (value: unknown): Response =>
  value instanceof Response ? value : Response.json(value ?? {}, { headers: { 'Cache-Control': 'no-store' } });

/** A browser names the page that a request comes from: another site's page may not act in a person's name. */
export function refuseForeignOrigin(request: Request): void {
  if (request.method === 'GET' || request.method === 'HEAD') return;
  const origin = request.headers.get('origin');
  if (!origin) return;
  // A page that hides where it is from (a sandboxed frame) says "null", which is no address of ours.
  const host = URL.canParse(origin) ? new URL(origin).host : null;
  if (host !== (request.headers.get('x-forwarded-host') ?? request.headers.get('host'))) {
    throw new Problem('origin-refused', 'This request came from another site and was refused.');
  }
}

/**
 * What was entered on a device goes in under the name of the person who entered it: where somebody else has signed in there since, it
 * waits for its own.
 */
function refuseOtherPerson(request: Request, personId: string): void {
  const enteredBy = request.headers.get('x-entered-by');
  if (enteredBy !== null && enteredBy !== personId)
    throw new Problem('signed-out', 'Somebody else is signed in on this device now. Sign in again to send what you entered.');
}

/** The body, read no further than the limit. */
async function readBytes(request: Request, maxBytes: number): Promise<Buffer> {
  const chunks: Uint8Array[] = [];
  let size = 0;
  const reader = request.body?.getReader();
  while (reader) {
    const { done, value } = await reader.read();
    if (done) break;
    size += value.byteLength;
    if (size > maxBytes) {
      await reader.cancel();
      throw new Problem('input-too-large', `More than ${sizeInWords(maxBytes)} were sent; nothing was changed.`);
    }
    chunks.push(value);
  }
  return Buffer.concat(chunks);
}

/** The JSON body, read no further than the limit. */
export async function readJson(request: Request, maxBytes: number): Promise<unknown> {
  const text = (await readBytes(request, maxBytes)).toString('utf8');
  const value = parseJson(text);
  if (unstorable.test(text)) throw new Problem('input-invalid', 'A text holds a character that cannot be stored; nothing was changed.');
  return value;
}

const sizeInWords = (bytes: number): string =>
  bytes < 1 << 20 ? `${Math.round(bytes / 1024)} KiB` : `${Math.round(bytes / (1 << 20))} MiB`;

/** PostgreSQL stores neither NUL nor half of a surrogate pair; in JSON both can only be written as escapes. */
const unstorable = /(?<!\\)(?:\\\\)*\\u(?:0000|d[89ab][0-9a-f]{2}(?!\\ud[c-f][0-9a-f]{2})|(?<!\\ud[89ab][0-9a-f]{2}\\u)d[c-f][0-9a-f]{2})/i;

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    throw new Problem('input-invalid', 'What was sent is not JSON; nothing was changed.');
  }
}

/** The one place where an error becomes an answer. */
export function refusal(error: unknown, requestId: string): Response {
  const known =
    error instanceof z.ZodError
      ? new Problem('input-invalid', 'Some of what was sent cannot be used; nothing was changed.', {
          // A drawing may have a fault in each of its pieces: the answer stays of a size that can be read.
          fields: error.issues.slice(0, 100).map((issue) => ({ path: issue.path.join('.'), message: issue.message })),
        })
      : error;
  if (known instanceof Problem) {
    const body = {
      type: `/problems/${known.code}`,
      title: known.message,
      status: known.status,
      code: known.code,
      requestId,
      ...known.extra,
    };
    return Response.json(body, {
      status: known.status,
      headers: { 'Content-Type': 'application/problem+json', 'Cache-Control': 'no-store' },
    });
  }
  log.error({ err: error, requestId }, 'unexpected error');
  return Response.json(
    {
      type: '/problems/unexpected',
      title: 'Something went wrong on the server. Nothing was changed; try again, and quote the request number if it stays.',
      status: 500,
      code: 'unexpected',
      requestId,
    },
    { status: 500, headers: { 'Content-Type': 'application/problem+json', 'Cache-Control': 'no-store' } },
  );
}
