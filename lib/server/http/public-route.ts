import { RateLimiterMemory } from 'rate-limiter-flexible';
import { v7 as uuidv7 } from 'uuid';
import type { z } from 'zod';
import { Problem } from '../problem';
import { readJson, refusal, refuseForeignOrigin } from './route';

interface Declaration<Body> {
  permission: 'public';
  body: z.ZodType<Body>;
  handle: (body: Body) => Promise<unknown>;
}

export interface PublicRoute {
  (request: Request): Promise<Response>;
  permission: 'public';
}

/** Thirty calls in a quarter of an hour from one address, over all public routes. Counted for each server process. */
const byCaller = new RateLimiterMemory({ keyPrefix: 'public', points: 30, duration: 15 * 60 });

/** Wraps the few route handlers that work without a session: rate limited, same checks and same form of error as `route`. */
export function publicRoute<Body>(declaration: Declaration<Body>): PublicRoute {
  const handler = async (request: Request): Promise<Response> => {
    try {
      refuseForeignOrigin(request);
      await countCall(request);
      const body = declaration.body.parse(await readJson(request, 16 << 10));
      return Response.json((await declaration.handle(body)) ?? {}, { headers: { 'Cache-Control': 'no-store' } });
    } catch (error) {
      return refusal(error, uuidv7());
    }
  };
  return Object.assign(handler, { permission: declaration.permission });
}

async function countCall(request: Request): Promise<void> {
  // Written by the nearest proxy. Where there is none a caller can invent it, so no route's safety rests on this count alone:
  // a reset is also counted by address, and a link's token cannot be guessed.
  // Cut to the length of an address, so that inventing them does not fill the memory.
  const caller = request.headers.get('x-forwarded-for')?.split(',').at(-1)?.trim().slice(0, 64) ?? 'unknown';
  try {
    await byCaller.consume(caller);
  } catch {
    throw new Problem('too-many-tries', 'Too many tries from here. Wait a quarter of an hour and try again.');
  }
}
