import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { buildIfStale } from '@/lib/setup/build.mjs';
import { openBuilding } from '../nothing-lost/building';
import { runNothingLost } from '../nothing-lost/run';
import type { Suite } from './run';

const READINGS = 1000;
const SEED = 20261201;
const BUILD_FOLDER = '.next-test';

/** A thousand readings through every mishap: how many were told safe, how many of these are in the database, once. */
export async function nothingLostSuite(): Promise<Suite> {
  await buildIfStale({ buildFolder: BUILD_FOLDER, say: (line) => process.stderr.write(`${line}\n`) });
  const folder = mkdtempSync(join(tmpdir(), 'evenhead-nothing-lost-'));
  chmodSync(folder, 0o711);
  const building = await openBuilding(folder, BUILD_FOLDER);
  try {
    const { kills, ...counts } = await runNothingLost(building, { readings: READINGS, seed: SEED });
    return { suite: 'nothing-lost', rows: [{ ...(counts as Record<string, number>), ...kills }], ...counts, kills };
  } finally {
    await building.stop();
    rmSync(folder, { recursive: true, force: true });
  }
}
