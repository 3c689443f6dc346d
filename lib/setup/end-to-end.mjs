import { join } from 'node:path';
import { buildIfStale } from './build.mjs';
import { requireChromium } from './chromium.mjs';
import { startFileServer } from './file-server.mjs';
import { startMailServer } from './mail-server.mjs';
import { applicationEnv, startNext, waitUntilUp } from './next-server.mjs';
import { freePort } from './ports.mjs';
import { newSecrets } from './secrets.mjs';
import { reports, runPlaywright, testBuildFolder } from './test-phases.mjs';

/**
 * Builds the application, serves it with the demo and a mail server, and drives it through the browser. The tests find in
 * BASE_URL where it is, in MAIL_FOLDER what it sent, in DATABASE_URL what it stored.
 * @param {{ throwAway: import('./throw-away.mjs').ThrowAway, lifetime: import('./lifetime.mjs').Lifetime, addServer: (pid: number) => void, say: (line: string) => void }} options
 */
export async function runEndToEnd({ throwAway, lifetime, addServer, say }) {
  await requireChromium(say);
  await buildIfStale({ buildFolder: testBuildFolder, say });
  const databaseUrl = await throwAway.migratedDatabase('e2e', { demo: true });
  const mailFolder = join(throwAway.folder, 'mail');
  const mail = await startMailServer(mailFolder);
  lifetime.atEnd(mail.stop);
  const files = await startFileServer(join(throwAway.folder, 'files'));
  lifetime.atEnd(files.stop);

  const port = await freePort();
  const address = `http://127.0.0.1:${port}`;
  const told = { databaseUrl, smtpUrl: mail.url, files: files.store, authSecret: newSecrets().authSecret, publicUrl: address };
  const env = { ...applicationEnv({ ...told, mode: 'production' }), NEXT_DIST_DIR: testBuildFolder };
  const server = startNext({ mode: 'start', host: '127.0.0.1', port, env, logFile: join(reports, 'e2e-server.log') });
  lifetime.atEnd(server.stop);
  addServer(server.pid);
  await waitUntilUp({ url: `${address}/api/health`, server });
  return runPlaywright({ BASE_URL: address, NEXT_DIST_DIR: testBuildFolder, MAIL_FOLDER: mailFolder, DATABASE_URL: databaseUrl });
}
