import type { NextAuthOptions } from 'next-auth';
import Credentials from 'next-auth/providers/credentials';
import { z } from 'zod';
import { log } from '../log';
import { Problem } from '../problem';
import { checkPassword } from './check-password';

const credentialsSchema = z.object({ email: z.string().max(320), password: z.string().max(1000) });

/** What is thrown here is shown on the sign-in page, so only a refusal made for people goes on as it is. */
function tellRefusalOnly(error: unknown): never {
  if (error instanceof Problem) throw error;
  log.error({ err: error }, 'unexpected error while signing in');
  throw new Error('Something went wrong on the server. Try again.');
}

/**
 * E-mail and password, session in a signed cookie (HttpOnly, SameSite=Lax, Secure whenever the public address is https).
 * The token only says who signed in and when; what the person may do is read from the database at each request.
 */
export const authOptions: NextAuthOptions = {
  secret: process.env.AUTH_SECRET ?? process.env.NEXTAUTH_SECRET,
  session: { strategy: 'jwt', maxAge: 7 * 24 * 3600 },
  pages: { signIn: '/sign-in' },
  providers: [
    Credentials({
      credentials: { email: {}, password: {} },
      authorize: async (input) => {
        const parsed = credentialsSchema.safeParse(input);
        return parsed.success ? checkPassword(parsed.data).catch(tellRefusalOnly) : null;
      },
    }),
  ],
  callbacks: {
    jwt: ({ token, user }) => {
      if (user) {
        token.organizationId = user.organizationId;
        token.personId = user.id;
        token.signedInAt = Date.now();
      }
      return token;
    },
    session: ({ session, token }) => ({
      ...session,
      organizationId: token.organizationId,
      personId: token.personId,
      signedInAt: token.signedInAt,
    }),
  },
};
