import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, test } from '@playwright/test';
import { openBuilding } from '../tests/nothing-lost/building';
import { runNothingLost } from '../tests/nothing-lost/run';

/** The short run of `npm run bench -- nothing-lost`, with every mishap in it. */
test('readings entered while network, tab, server and database fail are each in the database once, with their time', async () => {
  test.skip(!process.env.NEXT_DIST_DIR, 'needs the production build that `npm test` makes');
  test.setTimeout(300_000);
  const folder = mkdtempSync(join(tmpdir(), 'evenhead-nothing-lost-'));
  chmodSync(folder, 0o711);
  const building = await openBuilding(folder, process.env.NEXT_DIST_DIR!);
  try {
    const result = await runNothingLost(building, { readings: 150, seed: 7 });
    expect(result.kills.server).toBeGreaterThan(0);
    expect(result.kills.database).toBeGreaterThan(0);
    expect(result.kills.tab).toBeGreaterThan(0);
    expect(result.kills.answers).toBeGreaterThan(0);
    expect(result.entered).toBeGreaterThan(140);
    expect(result.stored).toBe(result.entered);
    expect(result.twice).toBe(0);
  } finally {
    await building.stop();
    rmSync(folder, { recursive: true, force: true });
  }
});
