import { join } from 'node:path';
import { openCluster } from './cluster.mjs';
import { describe } from './failure.mjs';
import { startFileServer } from './file-server.mjs';
import { startMailServer } from './mail-server.mjs';
import { migrate } from './migrate.mjs';
import { applicationEnv } from './next-server.mjs';
import { installPackages } from './packages.mjs';
import { openDataFolder, requireFreeSpace } from './places.mjs';
import { requireFreePort } from './ports.mjs';
import { clearCrashedRuns, liveRuns, recordRun, requireNoOtherRun } from './runs.mjs';
import { readSecrets } from './secrets.mjs';
import { isLoopback } from './settings.mjs';

/** @typedef {import('./settings.mjs').Settings} Settings */
/** @typedef {import('./lifetime.mjs').Lifetime} Lifetime */
/** @typedef {{ folder: string, env: NodeJS.ProcessEnv, demo: boolean, addServer: (pid: number) => void }} Prepared */

/** @param {string} line */
export const say = (line) => console.log(`· ${line}`);

/**
 * Everything that must be there before the server of `npm start` or `npm run dev` may run.
 * @param {Settings} settings
 * @param {{ database: string, mode: 'production' | 'development' }} what the private database's name
 * @param {Lifetime} lifetime
 * @returns {Promise<Prepared>}
 */
export async function prepare(settings, { database, mode }, lifetime) {
  const folder = openDataFolder(say);
  await requireFreeSpace(folder);
  await clearCrashedRuns(folder, say);
  if (mode === 'production') requireNoOtherRun(folder, settings.command);
  await requireFreePort(settings.port, settings.host, settings.command);
  const run = recordRun(folder, { command: settings.command, address: settings.address });
  lifetime.atEnd(run.remove);
  await installPackages(say);

  const secrets = readSecrets(folder);
  // The demo's passwords are in the repository: not for a server that others can reach.
  const demo = !settings.databaseUrl && isLoopback(settings.host) && isLoopback(new URL(settings.publicUrl).hostname);
  const databaseUrl = settings.databaseUrl ?? (await openPrivateDatabase(folder, secrets, database, lifetime));
  await migrate(databaseUrl, { demo }).catch((error) => {
    // Who works on a migration or on the demo wants to see it fail and the rest run.
    if (mode === 'production') throw error;
    console.error(describe(error));
  });
  const smtpUrl = settings.smtpUrl ?? (await openPrivateMail(folder, lifetime));
  const authSecret = settings.authSecret ?? secrets.authSecret;
  const files = settings.hasBucket ? {} : await openPrivateFiles(folder, lifetime);
  const env = applicationEnv({ databaseUrl, smtpUrl, files, authSecret, publicUrl: settings.publicUrl, mode });
  return { folder, env, demo, addServer: run.addServer };
}

/**
 * @param {string} folder
 * @param {import('./secrets.mjs').Secrets} secrets
 * @param {string} database
 * @param {Lifetime} lifetime
 */
async function openPrivateDatabase(folder, secrets, database, lifetime) {
  const cluster = await openCluster({ folder, secrets, say });
  lifetime.atEnd(async () => {
    // `npm start` and `npm run dev` of one checkout share the cluster: the last one out stops it.
    if (liveRuns(folder).length <= 1) await cluster.stop();
  });
  say(`database on 127.0.0.1:${cluster.port}`);
  return cluster.database(database);
}

/**
 * @param {string} folder
 * @param {Lifetime} lifetime
 */
async function openPrivateMail(folder, lifetime) {
  const mailFolder = join(folder, 'mail');
  const mail = await startMailServer(mailFolder);
  lifetime.atEnd(mail.stop);
  say(`no SMTP_URL: mail is kept in ${mailFolder}`);
  return mail.url;
}

/**
 * @param {string} folder
 * @param {Lifetime} lifetime
 */
async function openPrivateFiles(folder, lifetime) {
  const filesFolder = join(folder, 'files');
  const files = await startFileServer(filesFolder);
  lifetime.atEnd(files.stop);
  say(`no S3_BUCKET: photos and certificates are kept in ${filesFolder}`);
  return files.store;
}
