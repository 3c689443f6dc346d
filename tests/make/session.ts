import { vi } from 'vitest';

interface Session {
  organizationId: string;
  personId: string;
  signedInAt: number;
}

const holder = globalThis as typeof globalThis & { evenheadTestSession?: Session | null };

// Route handlers are called directly, without a browser and so without a cookie: the session's source is the one thing
// replaced. Real sign-in, cookie and all, is what the end-to-end tests do.
vi.mock('next-auth', async (load) => ({
  ...(await load<object>()),
  getServerSession: async () => holder.evenheadTestSession ?? null,
}));

/** Signs a person in for the calls that follow; `null` signs out. */
export function signInAs(person: { organizationId: string; id: string } | null, signedInAt = Date.now()): void {
  holder.evenheadTestSession = person && { organizationId: person.organizationId, personId: person.id, signedInAt };
}
