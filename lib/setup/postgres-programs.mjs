import { accessSync, constants, existsSync, readdirSync, readFileSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import { installFromDebian } from './debian.mjs';
import { SetupFailure } from './failure.mjs';
import { isRoot, run } from './processes.mjs';

/** @typedef {{ folder: string, major: string }} PostgresPrograms where initdb, pg_ctl and psql of one version are */

const debianFolder = '/usr/lib/postgresql';

/**
 * PostgreSQL's programs: those that made the cluster if it exists, else the newest; installed when there are none.
 * @param {string} clusterFolder
 * @param {(line: string) => void} say
 * @returns {Promise<PostgresPrograms>}
 */
export async function findPostgres(clusterFolder, say) {
  let found = await installedVersions();
  if (found.length === 0) {
    await installFromDebian(['postgresql'], 'There is no PostgreSQL on this machine', say);
    found = await installedVersions();
  }
  if (found.length === 0)
    throw new SetupFailure('PostgreSQL was installed but its programs were not found. Put initdb and pg_ctl on the PATH.');
  if (isRoot() && !hasPostgresUser())
    throw new SetupFailure('PostgreSQL refuses to run as root and there is no user "postgres". Start Evenhead as an ordinary user.');
  return programsFor(clusterFolder, found);
}

/**
 * @param {string} clusterFolder
 * @param {PostgresPrograms[]} found newest first
 */
export function programsFor(clusterFolder, found) {
  const versionFile = join(clusterFolder, 'PG_VERSION');
  if (!existsSync(versionFile)) return found[0];
  const madeBy = readFileSync(versionFile, 'utf8').trim();
  const match = found.find((programs) => programs.major === madeBy);
  if (match) return match;
  throw new SetupFailure(
    `The database in ${clusterFolder} was made by PostgreSQL ${madeBy}, this machine has ${found.map((programs) => programs.major).join(', ')}. ` +
      `Install postgresql-${madeBy}, or move that folder away to begin with an empty database.`,
  );
}

/** @returns {Promise<PostgresPrograms[]>} newest first */
async function installedVersions() {
  const versions = existsSync(debianFolder) ? readdirSync(debianFolder) : [];
  const folders = [...versions.map((version) => join(debianFolder, version, 'bin')), ...(process.env.PATH ?? '').split(delimiter)];
  const found = await Promise.all(folders.filter(holdsPrograms).map(readMajor));
  return found.sort((a, b) => Number(b.major) - Number(a.major));
}

/** @param {string} folder */
function holdsPrograms(folder) {
  return ['initdb', 'pg_ctl', 'postgres', 'psql'].every((program) => {
    try {
      accessSync(join(folder, program), constants.X_OK);
      return true;
    } catch {
      return false;
    }
  });
}

/** @param {string} folder */
async function readMajor(folder) {
  const { output } = await run(join(folder, 'pg_ctl'), ['--version']);
  return { folder, major: /(\d+)/.exec(output)?.[1] ?? '0' };
}

const hasPostgresUser = () => /^postgres:/m.test(readFileSync('/etc/passwd', 'utf8'));
