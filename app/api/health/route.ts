import { db } from '@/db/knex';

export const dynamic = 'force-dynamic';

/** Answers 200 once the server and its database answer: what the starter and a load balancer ask. */
export async function GET(): Promise<Response> {
  try {
    await db().raw('select 1');
    return Response.json({ status: 'ready' });
  } catch {
    return Response.json({ status: 'no database' }, { status: 503 });
  }
}
