import { mkdirSync } from 'node:fs';
import { runEndToEnd } from './end-to-end.mjs';
import { describe, Interrupted, SetupFailure } from './failure.mjs';
import { inOneLifetime } from './lifetime.mjs';
import { installPackages, requireNode } from './packages.mjs';
import { requireFreeSpace, root } from './places.mjs';
import { say } from './prepare.mjs';
import { clearCrashedRuns, recordRun, requireNoOtherRun } from './runs.mjs';
import { checkTypes, lint, reports, runVitest } from './test-phases.mjs';
import { openThrowAwayCluster } from './throw-away.mjs';

/** @typedef {import('./test-phases.mjs').Tally} Tally */
/** @typedef {import('./throw-away.mjs').ThrowAway} ThrowAway */
/** @typedef {{ lifetime: import('./lifetime.mjs').Lifetime, addServer: (pid: number) => void, throwAway: () => Promise<ThrowAway> }} Surroundings */

/** @type {Record<string, (surroundings: Surroundings) => Promise<Tally>>} in the order in which they run */
const phases = {
  types: checkTypes,
  lint,
  unit: () => runVitest('unit'),
  reference: () => runVitest('reference'),
  async integration({ throwAway }) {
    const { folder, migratedDatabase } = await throwAway();
    return runVitest('integration', { DATABASE_URL: await migratedDatabase('integration', { demo: false }), TMPDIR: folder });
  },
  async e2e({ throwAway, lifetime, addServer }) {
    return runEndToEnd({ throwAway: await throwAway(), lifetime, addServer, say });
  },
};

/** @type {Tally} */
const total = { passed: 0, failed: 0 };

/** @param {string} line */
function fail(line) {
  console.error(line);
  total.failed += 1;
}

/** @param {string[]} words */
function wantedPhases(words) {
  const unknown = words.find((word) => !(word in phases));
  if (unknown) throw new SetupFailure(`There is no phase "${unknown}". Name some of: ${Object.keys(phases).join(', ')}; or none, for all.`);
  return Object.keys(phases).filter((phase) => words.length === 0 || words.includes(phase));
}

/**
 * @param {string} name
 * @param {Surroundings} surroundings
 */
async function runPhase(name, surroundings) {
  console.log(`\n== ${name}`);
  const begun = Date.now();
  try {
    const { passed, failed } = await phases[name](surroundings);
    total.passed += passed;
    total.failed += failed;
    console.log(`== ${name}: ${passed} good, ${failed} bad, ${Math.round((Date.now() - begun) / 1000)} s`);
  } catch (error) {
    if (error instanceof Interrupted) throw error;
    fail(describe(error));
  }
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

    /** @type {Promise<ThrowAway> | undefined} made by the first phase that needs it */
    let opened;
    const throwAway = () => (opened ??= openThrowAwayCluster(say, lifetime));
    for (const phase of wanted) await runPhase(phase, { lifetime, addServer: record.addServer, throwAway });
    return total.failed === 0 && total.passed > 0 ? 0 : 1;
  },
  { codeWhenStopped: 130, onFailure: fail },
);
