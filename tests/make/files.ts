import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll } from 'vitest';
import { startFileServer } from '@/lib/setup/file-server.mjs';

/** Gives the suite the store for files that `npm start` runs where none is configured, in a folder of its own. */
export function withFiles(): void {
  let stop: () => Promise<void>;
  let folder: string;
  beforeAll(async () => {
    folder = await mkdtemp(join(tmpdir(), 'evenhead-files-'));
    const server = await startFileServer(folder);
    stop = server.stop;
    Object.assign(process.env, server.store);
  });
  afterAll(async () => {
    await stop?.();
    await rm(folder, { recursive: true, force: true });
  });
}
