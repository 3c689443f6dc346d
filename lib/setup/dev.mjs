import { bundleWorkers } from './build.mjs';
import { inOneLifetime } from './lifetime.mjs';
import { failWhenEnded, startNext, waitUntilUp } from './next-server.mjs';
import { requireNode } from './packages.mjs';
import { prepare, say } from './prepare.mjs';
import { readSettings } from './settings.mjs';
import { printSignIns } from './sign-ins.mjs';

await inOneLifetime(async (lifetime) => {
  requireNode();
  const settings = readSettings({ command: 'npm run dev', defaultPort: 4310 });
  const prepared = await prepare(settings, { database: 'evenhead_dev', mode: 'development' }, lifetime);
  await bundleWorkers(prepared.env);
  const server = startNext({ mode: 'dev', host: settings.host, port: settings.port, env: prepared.env });
  lifetime.atEnd(server.stop);
  prepared.addServer(server.pid);
  // A page under work may well be broken: any answer will do.
  await waitUntilUp({ url: `${settings.address}/api/health`, server, accept: () => true });
  say(`Evenhead (development) is at ${settings.address}`);
  if (prepared.demo) printSignIns();
  return Promise.race([failWhenEnded(server), lifetime.untilStopped()]);
});
