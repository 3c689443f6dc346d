import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { buildIfStale } from './build.mjs';
import { requireChromium } from './chromium.mjs';
import { describe, Interrupted, SetupFailure } from './failure.mjs';
import { inOneLifetime } from './lifetime.mjs';
import { startMailServer } from './mail-server.mjs';
import { migrate } from './migrate.mjs';
import { applicationEnv, startNext, waitUntilUp } from './next-server.mjs';
import { installPackages, requireNode } from './packages.mjs';
import { requireFreeSpace, root } from './places.mjs';
import { freePort } from './ports.mjs';
import { clearCrashedRuns, recordRun, requireNoOtherRun } from './runs.mjs';
import { newSecrets } from './secrets.mjs';
import { checkTypes, lint, runPlaywright, runVitest, testBuildFolder } from './test-phases.mjs';
import { openThrowAwayCluster } from './throw-away.mjs';

/** @typedef {import('./test-phases.mjs').Tally} Tally */
/** @typedef {import('./lifetime.mjs').Lifetime} Lifetime */

const reports = join(root, 'reports');
const total = { passed: 0, failed: 0 };

/** @param {string} line */
const say = (line) => console.log(`· ${line}`);

/** @param {string} line */
function fail(line) {
  console.error(line);
  total.failed += 1;
}

await inOneLifetime(
  async (lifetime) => {
    lifetime.atEnd(() => console.log(`${total.passed} passed, ${total.failed} failed`));
    requireNode();
    const wanted = wantedPhases(process.argv.slice(2));
    mkdirSync(reports, { recursive: true });
    await requireFreeSpace(root);
    await clearCrashedRuns(reports, say);
    requireNoOtherRun(reports, 'npm test');
    const record = recordRun(reports, { command: 'npm test', address: '' });
    lifetime.atEnd(record.remove);
    await installPackages(say);

    for (const phase of wanted) await runPhase(phase, () => phases[phase](lifetime, record.addServer));
    return total.failed === 0 && total.passed > 0 ? 0 : 1;
  },
  { codeWhenStopped: 130, onFailure: fail },
);

/** @typedef {(lifetime: Lifetime, addServer: (pid: number) => void) => Promise<Tally>} Phase */

/** @type {Record<string, Phase>} in the order in which they run */
const phases = {
  types: checkTypes,
  lint,
  unit: () => runVitest('unit'),
  reference: () => runVitest('reference'),
  integration: async (lifetime) => runVitest('integration', { DATABASE_URL: await migratedDatabase('integration', { demo: false }, lifetime) }),
  e2e: runEndToEnd,
};

/** @param {string[]} words */
function wantedPhases(words) {
  const unknown = words.filter((word) => !(word in phases));
  if (unknown.length > 0) throw new SetupFailure(`There is no phase "${unknown[0]}". Name some of: ${Object.keys(phases).join(', ')}; or none, for all.`);
  return Object.keys(phases).filter((phase) => words.length === 0 || words.includes(phase));
}

/**
 * @param {string} name
 * @param {() => Promise<Tally>} phase
 */
async function runPhase(name, phase) {
  console.log(`\n== ${name}`);
  const begun = Date.now();
  try {
    const { passed, failed } = await phase();
    total.passed += passed;
    total.failed += failed;
    console.log(`== ${name}: ${passed} good, ${failed} bad, ${Math.round((Date.now() - begun) / 1000)} s`);
  } catch (error) {
    if (error instanceof Interrupted) throw error;
    fail(describe(error));
  }
}

/** @type {ReturnType<typeof openThrowAwayCluster> | null} opened by the first phase that needs it */
let throwAway = null;

/**
 * @param {string} name
 * @param {{ demo: boolean }} options
 * @param {Lifetime} lifetime
 */
async function migratedDatabase(name, options, lifetime) {
  throwAway ??= openThrowAwayCluster(say, lifetime);
  const url = await (await throwAway).cluster.database(name);
  await migrate(url, options);
  return url;
}

/** @type {Phase} the built application, with the demo, driven through the browser */
async function runEndToEnd(lifetime, addServer) {
  await requireChromium(say);
  await buildIfStale({ buildFolder: testBuildFolder, say });
  const databaseUrl = await migratedDatabase('e2e', { demo: true }, lifetime);
  const { folder } = await /** @type {NonNullable<typeof throwAway>} */ (throwAway);
  const mailFolder = join(folder, 'mail');
  const mail = await startMailServer(mailFolder);
  lifetime.atEnd(mail.stop);

  const port = await freePort();
  const address = `http://127.0.0.1:${port}`;
  const secrets = newSecrets();
  const env = {
    ...applicationEnv({ databaseUrl, smtpUrl: mail.url, authSecret: secrets.authSecret, publicUrl: address, mode: 'production' }),
    NEXT_DIST_DIR: testBuildFolder,
  };
  const server = startNext({ mode: 'start', host: '127.0.0.1', port, env, logFile: join(reports, 'e2e-server.log') });
  lifetime.atEnd(server.stop);
  addServer(server.pid);
  await waitUntilUp({ url: `${address}/api/health`, server });
  return runPlaywright({ BASE_URL: address, MAIL_FOLDER: mailFolder, DATABASE_URL: databaseUrl });
}
