import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { runningServer } from '@/lib/setup/cluster-folder.mjs';
import { openCluster } from '@/lib/setup/cluster.mjs';
import { startFileServer } from '@/lib/setup/file-server.mjs';
import { migrate } from '@/lib/setup/migrate.mjs';
import { applicationEnv, startNext, waitUntilUp } from '@/lib/setup/next-server.mjs';
import { freePort } from '@/lib/setup/ports.mjs';
import { newSecrets } from '@/lib/setup/secrets.mjs';

/** A server with a database of its own, both of which can be killed as a power cut would and come up again where they were. */
export interface Building {
  address: string;
  databaseUrl: string;
  killServer(): Promise<void>;
  killDatabase(): Promise<void>;
  stop(): Promise<void>;
}

/** `folder`: empty, for the cluster; `buildFolder`: the production build to serve. */
export async function openBuilding(folder: string, buildFolder: string): Promise<Building> {
  const secrets = newSecrets();
  const say = () => undefined;
  // Not a throw-away cluster: those do not write through to the disk, and what is tested here is that this one does.
  let cluster = await openCluster({ folder, secrets, say });
  const databaseUrl = await cluster.database('nothing_lost');
  await migrate(databaseUrl, { demo: true });
  mkdirSync(join(folder, 'files'), { recursive: true });
  const files = await startFileServer(join(folder, 'files'));
  const port = await freePort();
  const address = `http://127.0.0.1:${port}`;
  const told = { databaseUrl, smtpUrl: 'smtp://127.0.0.1:9', files: files.store, authSecret: newSecrets().authSecret, publicUrl: address };
  const env = { ...applicationEnv({ ...told, mode: 'production' }), NEXT_DIST_DIR: buildFolder };
  const start = async () => {
    const started = startNext({ mode: 'start', host: '127.0.0.1', port, env, logFile: join(folder, 'server.log') });
    await waitUntilUp({ url: `${address}/api/health`, server: started, accept: () => true });
    return started;
  };
  let server = await start();
  return {
    address,
    databaseUrl,
    async killServer() {
      process.kill(-server.pid, 'SIGKILL');
      await server.stopped;
      server = await start();
    },
    async killDatabase() {
      const running = runningServer(join(folder, 'cluster'));
      if (running) process.kill(running.pid, 'SIGKILL');
      cluster = await openCluster({ folder, secrets, say });
    },
    async stop() {
      await server.stop();
      await files.stop();
      await cluster.stop();
    },
  };
}
