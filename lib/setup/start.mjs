import { buildIfStale } from './build.mjs';
import { inOneLifetime } from './lifetime.mjs';
import { failWhenEnded, startNext, waitUntilUp } from './next-server.mjs';
import { requireNode } from './packages.mjs';
import { prepare, say } from './prepare.mjs';
import { readSettings } from './settings.mjs';
import { printSignIns } from './sign-ins.mjs';

const buildFolder = '.next';

await inOneLifetime(async (lifetime) => {
  requireNode();
  const settings = readSettings({ command: 'npm start', defaultPort: 4300 });
  const prepared = await prepare(settings, { database: 'evenhead', mode: 'production' }, lifetime);
  await buildIfStale({ buildFolder, say });

  const env = { ...prepared.env, NEXT_DIST_DIR: buildFolder };
  const server = startNext({ mode: 'start', host: settings.host, port: settings.port, env });
  lifetime.atEnd(server.stop);
  prepared.addServer(server.pid);
  await waitUntilUp({ url: `${settings.address}/api/health`, server });

  say(`Evenhead is at ${settings.publicUrl}`);
  if (prepared.demo) printSignIns();
  say('stop it with Ctrl-C; what was entered is kept');
  return Promise.race([failWhenEnded(server), lifetime.untilStopped()]);
});
