import { RateLimiterMemory } from 'rate-limiter-flexible';
import { Problem } from '../problem';

/** Ten wrong passwords for one address in a quarter of an hour, then a wait. Counted for each server process. */
const byAddress = new RateLimiterMemory({ keyPrefix: 'sign-in', points: 10, duration: 15 * 60 });

export async function countSignInTry(email: string): Promise<void> {
  try {
    await byAddress.consume(email);
  } catch {
    throw new Problem('too-many-tries', 'Too many tries for this address. Wait a quarter of an hour, or reset the password.');
  }
}

export const forgetSignInTries = (email: string): Promise<boolean> => byAddress.delete(email);
