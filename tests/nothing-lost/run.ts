import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';
import knex, { type Knex } from 'knex';
import { chromium, type BrowserContext, type Page } from '@playwright/test';
import { v7 as uuidv7 } from 'uuid';
import type { RecordReading } from '@/lib/api/commissioning';
import config from '@/playwright.config';
import { SeededRandom } from '../site/seeded-random';
import type { Building } from './building';

export interface NothingLost {
  entered: number;
  /** Of those, readings that are in the database with the time they were taken. */
  stored: number;
  /** Readings that are in it more than once. */
  twice: number;
  kills: { server: number; database: number; tab: number; network: number; answers: number };
  [figure: string]: unknown;
}

/** How often the network goes, and comes again once it is gone; how often a tab is closed and an answer lost. */
const OFFLINE = 0.04;
const ONLINE = 0.15;
const CLOSED_TABS = 0.02;
const LOST_ANSWERS = 0.06;
/** One kill for every so many readings, and one at least. */
const READINGS_A_SERVER = 200;
const READINGS_A_DATABASE = 250;
const TABLET_PATH = '/tablet-under-test';
const MOST_MINUTES_TO_SEND = 5;

/**
 * Enters readings in a browser while the network drops, tabs close, answers get lost, and the server and PostgreSQL are killed, at points
 * that the seed decides; then lets everything come up again and counts what is in the database.
 */
export async function runNothingLost(building: Building, { readings, seed }: { readings: number; seed: number }): Promise<NothingLost> {
  const random = new SeededRandom(seed);
  // Its own, for requests come when they come.
  const luck = new SeededRandom(seed + 1);
  const places = (every: number) =>
    new Set(Array.from({ length: Math.ceil(readings / every) }, () => Math.floor(random.uniform() * readings)));
  const killsAt = { server: places(READINGS_A_SERVER), database: places(READINGS_A_DATABASE) };
  const kills = { server: 0, database: 0, tab: 0, network: 0, answers: 0 };
  const db = knex({ client: 'pg', connection: building.databaseUrl, pool: { min: 0, max: 2 } });
  const script = await tabletScript();
  const browser = await chromium.launch(config.use?.launchOptions);
  try {
    const context = await browser.newContext({ serviceWorkers: 'block', baseURL: building.address });
    await signIn(context);
    const where = await openRound(db);
    await context.route(`**${TABLET_PATH}`, (route) =>
      route.fulfill({ contentType: 'text/html', body: `<!doctype html><title>Tablet</title><script>${script}</script>` }),
    );
    await context.route('**/api/rounds/*/readings', async (route) => {
      if (luck.uniform() >= LOST_ANSWERS) return route.continue();
      kills.answers++;
      // The server has it and says so; nobody hears it.
      await route.fetch().catch(() => undefined);
      await route.abort('connectionreset').catch(() => undefined);
    });
    let tablet = await openTablet(context);
    const entered = new Map<string, string>();
    let restart = Promise.resolve();
    let isOffline = false;

    for (let at = 0; at < readings; at++) {
      if (random.uniform() < (isOffline ? ONLINE : OFFLINE)) {
        isOffline = !isOffline;
        if (isOffline) kills.network++;
        await context.setOffline(isOffline);
      }
      // Readings go on being entered while what was killed comes up again.
      for (const [what, kill] of [
        ['server', building.killServer],
        ['database', building.killDatabase],
      ] as const) {
        if (!killsAt[what].has(at)) continue;
        await restart;
        kills[what]++;
        restart = kill();
      }
      const body = anyReading(random, where, at);
      const keeping = tablet.evaluate(([person, loop, round, reading]) => window.tablet.enter(person, loop, round, reading), [
        where.personId,
        where.loopId,
        where.roundId,
        body,
      ] as const);
      if (random.uniform() < CLOSED_TABS) {
        // In the middle of keeping it: only what the screen had said is safe must be.
        kills.tab++;
        const wasSafe = await Promise.race([keeping.then(() => true), tablet.close({ runBeforeUnload: false }).then(() => false)]).catch(
          () => false,
        );
        await keeping.catch(() => undefined);
        if (!tablet.isClosed()) await tablet.close();
        if (isOffline) await context.setOffline(false);
        tablet = await openTablet(context);
        if (isOffline) await context.setOffline(true);
        if (wasSafe) entered.set(body.id, body.takenAt);
      } else {
        await keeping;
        entered.set(body.id, body.takenAt);
      }
      tablet.evaluate((person) => window.tablet.send(person), where.personId).catch(() => undefined);
    }

    await context.setOffline(false);
    await restart;
    await sendTheRest(tablet, where.personId);
    return { ...(await count(db, entered)), kills };
  } finally {
    await browser.close();
    await db.destroy();
  }
}

async function tabletScript(): Promise<string> {
  const bundled = await build({
    entryPoints: [fileURLToPath(new URL('tablet.ts', import.meta.url))],
    bundle: true,
    write: false,
    format: 'iife',
    target: 'es2022',
  });
  return bundled.outputFiles[0]!.text.replaceAll('</script', '<\\/script');
}

async function openTablet(context: BrowserContext): Promise<Page> {
  const page = await context.newPage();
  await page.goto(TABLET_PATH);
  return page;
}

async function signIn(context: BrowserContext): Promise<void> {
  const signIns: { email: string; password: string }[] = JSON.parse(readFileSync('db/demo-sign-ins.json', 'utf8'));
  const technician = signIns.find(({ email }) => email.startsWith('tobin'))!;
  const page = await context.newPage();
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(technician.email);
  await page.getByLabel('Password', { exact: true }).fill(technician.password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL('**/projects');
  await page.close();
}

interface Where {
  personId: string;
  loopId: string;
  roundId: string;
  stationIds: string[];
  instrumentId: string;
}

/** A round of the demo's technician, open for as long as this runs. */
async function openRound(db: Knex): Promise<Where> {
  const person = await db('people').where('email', 'like', 'tobin%').first('id', 'organization_id');
  const loop = await db('loops').where({ state: 'in-commissioning' }).first('id');
  const revision = await db('revisions').where({ loop_id: loop.id }).orderBy('number', 'desc').first('id');
  const open = await db('rounds').where({ loop_id: loop.id }).whereNull('closed_at').first('id');
  const roundId = open?.id ?? uuidv7();
  if (!open) {
    const last = await db('rounds').where({ loop_id: loop.id }).max('number as number').first();
    await db('rounds').insert({
      organization_id: person.organization_id,
      id: roundId,
      loop_id: loop.id,
      revision_id: revision.id,
      number: (last?.number ?? 0) + 1,
      purpose: 'Nothing lost',
      started_by: person.id,
    });
  }
  const stations = await db('station_designs').where({ revision_id: revision.id }).select('station_id');
  const instrument = await db('instruments').where({ kind: 'flow', is_retired: false }).first('id');
  return {
    personId: person.id,
    loopId: loop.id,
    roundId,
    stationIds: stations.map((row) => row.station_id),
    instrumentId: instrument.id,
  };
}

/** Each a second after the one before, so that its time tells which it is. */
function anyReading(random: SeededRandom, { stationIds, instrumentId }: Where, at: number): RecordReading {
  const flowLs = Number(random.between(0.05, 0.5).toFixed(3));
  return {
    id: uuidv7(),
    stationId: stationIds[Math.floor(random.uniform() * stationIds.length)]!,
    method: 'direct-flow',
    settingTurns: null,
    dropKpa: null,
    flowLs,
    heatKw: null,
    supplyC: null,
    returnC: null,
    pumpSpeed: null,
    entered: [{ quantity: 'flow', text: String(flowLs), unit: 'L/s' }],
    instrumentId,
    takenAt: new Date(Date.UTC(2026, 5, 1, 8) + 1000 * at).toISOString(),
    clockOffsetMs: null,
    note: '',
    correctsReadingId: null,
  };
}

/** The tablet sends by itself every few seconds; here it is asked to, until nothing waits. */
async function sendTheRest(tablet: Page, personId: string): Promise<void> {
  const deadline = Date.now() + MOST_MINUTES_TO_SEND * 60_000;
  for (;;) {
    await tablet.evaluate((person) => window.tablet.send(person), personId);
    const { waiting, refusals } = await tablet.evaluate((person) => window.tablet.waiting(person), personId);
    if (refusals.length) throw new Error(`refused: ${refusals[0]}`);
    if (waiting === 0) return;
    if (Date.now() > deadline) throw new Error(`${waiting} readings were not sent`);
    await new Promise((resolve) => setTimeout(resolve, 500));
  }
}

async function count(db: Knex, entered: ReadonlyMap<string, string>): Promise<Pick<NothingLost, 'entered' | 'stored' | 'twice'>> {
  const rows: { id: string; taken_at: Date }[] = await db('readings')
    .whereRaw("note = '' and taken_at >= '2026-06-01T08:00:00Z'")
    .select('id', 'taken_at');
  const atTime = new Map<number, number>();
  for (const { taken_at: at } of rows) atTime.set(at.getTime(), (atTime.get(at.getTime()) ?? 0) + 1);
  const timeOf = new Map(rows.map(({ id, taken_at: at }) => [id, at.toISOString()]));
  const times = new Set([...entered.values()].map((text) => Date.parse(text)));
  return {
    entered: entered.size,
    stored: [...entered].filter(([id, takenAt]) => timeOf.get(id) === takenAt).length,
    twice: [...atTime].filter(([time, many]) => times.has(time) && many > 1).length,
  };
}
