import NextAuth from 'next-auth';
import { v7 as uuidv7 } from 'uuid';
import { authOptions } from '@/lib/server/auth/auth-options';
import { refusal } from '@/lib/server/http/route';
import { Problem } from '@/lib/server/problem';

const handler = NextAuth(authOptions);
const mostBytes = 16 << 10;

/** The library reads whatever is sent, signed in or not, into memory: only a body that says it is small goes on to it. */
function limited(request: Request, context: { params: Promise<{ nextauth: string[] }> }): Promise<Response> | Response {
  const length = request.headers.get('content-length');
  if (length !== null && Number(length) <= mostBytes) return handler(request, context);
  return refusal(new Problem('input-too-large', 'More was sent than a sign-in needs; nothing was changed.'), uuidv7());
}

export { handler as GET, limited as POST };
