import type { CommissioningBody } from '@/lib/api/commissioning';
import type { LoopState, RevisionBody } from '@/lib/api/loops';
import type { SiteBody } from '@/lib/api/site';
import { deviceDatabase } from './device-database';
import { send } from './http';
import { storeShell } from './shell-cache';

/** A loop as it was taken along: all that its pages on site need where there is no signal. */
export interface AboardLoop {
  personId: string;
  loop: { id: string; name: string; projectId: string; state: LoopState };
  mayRecord: boolean;
  mayRaise: boolean;
  body: CommissioningBody;
  site: SiteBody;
  /** Drawing, schedule and balance that are measured against; null where nothing is issued yet. */
  revision: RevisionBody | null;
  /** When it was read from the server, by this device's clock, ISO. */
  takenAt: string;
}

/** The loops that a person has taken along on this device, by name. */
export async function aboardLoops(personId: string): Promise<AboardLoop[]> {
  const loops = await (await deviceDatabase()).getAllFromIndex('aboard', 'personId', personId);
  return loops.sort((a, b) => a.loop.name.localeCompare(b.loop.name));
}

export async function aboardLoop(personId: string, loopId: string): Promise<AboardLoop | null> {
  return (await (await deviceDatabase()).get('aboard', [personId, loopId])) ?? null;
}

/**
 * Reads all there is of a loop from the server and puts it and the application itself on this device. Throws `RequestError` where the
 * server does not answer; what was aboard before then stays.
 */
export async function takeAlong(about: Pick<AboardLoop, 'personId' | 'loop' | 'mayRecord' | 'mayRaise'>): Promise<AboardLoop> {
  const path = `/api/loops/${about.loop.id}`;
  await storeShell();
  const [body, site] = await Promise.all([send<CommissioningBody>('GET', `${path}/commissioning`), send<SiteBody>('GET', `${path}/site`)]);
  const revision = body.revision ? await send<RevisionBody>('GET', `${path}/revisions/${body.revision.number}`) : null;
  const aboard: AboardLoop = { ...about, body, site, revision, takenAt: new Date().toISOString() };
  await put(aboard);
  // Without this a browser that runs out of room may clear what nobody has looked at for a while.
  await navigator.storage?.persist?.();
  return aboard;
}

/** Renews part of what is aboard with what the server has just said; a loop that is not aboard stays ashore. */
export async function renewAboard(personId: string, loopId: string, part: Partial<Pick<AboardLoop, 'body' | 'site'>>): Promise<void> {
  const aboard = await aboardLoop(personId, loopId);
  if (aboard) await put({ ...aboard, ...part, takenAt: new Date().toISOString() });
}

export async function leaveBehind(personId: string, loopId: string): Promise<void> {
  await (await deviceDatabase()).delete('aboard', [personId, loopId]);
}

/** At sign-out: nothing of the loops stays on the device. Entries that were not sent stay, for their person alone. */
export async function leaveAllBehind(): Promise<void> {
  await (await deviceDatabase()).clear('aboard');
}

async function put(aboard: AboardLoop): Promise<void> {
  const transaction = (await deviceDatabase()).transaction('aboard', 'readwrite', { durability: 'strict' });
  await Promise.all([transaction.store.put(aboard), transaction.done]);
}
