import { hash, verify } from '@node-rs/argon2';

/** argon2id with the library's defaults raised to OWASP's first recommendation (19 MiB, two passes, one lane). */
const cost = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export const hashPassword = (password: string): Promise<string> => hash(password, cost);

// A real hash of a random value: verifying against it takes as long as against a person's own, so that the time
// of an answer does not tell whether an address is known.
let decoy: Promise<string> | undefined;

/** Whether the password fits the hash; without a hash it always answers no, in the same time. */
export async function passwordFits(passwordHash: string | null | undefined, password: string): Promise<boolean> {
  if (passwordHash) return verify(passwordHash, password);
  decoy ??= hashPassword(crypto.randomUUID());
  await verify(await decoy, password);
  return false;
}
