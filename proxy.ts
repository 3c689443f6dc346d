import { NextResponse, type NextRequest } from 'next/server';

/** Tells the pages which address was asked for, so that signing in leads back to it (see `requirePerson`). */
export function proxy(request: NextRequest): NextResponse {
  const headers = new Headers(request.headers);
  headers.set('x-requested-path', request.nextUrl.pathname + request.nextUrl.search);
  return NextResponse.next({ request: { headers } });
}

export const config = { matcher: ['/((?!api/|_next/|.*\\.[a-z0-9]+$).*)'] };
