import { randomBytes } from 'node:crypto';
import { chmodSync, existsSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { SetupFailure } from './failure.mjs';

/** @typedef {{ authSecret: string, superuserPassword: string, databasePassword: string }} Secrets */

/** @returns {Secrets} */
export const newSecrets = () => ({ authSecret: newSecret(), superuserPassword: newSecret(), databasePassword: newSecret() });

// 256 bits; hexadecimal so that it needs no quoting in a URL or in SQL.
const newSecret = () => randomBytes(32).toString('hex');

/**
 * The secrets of this checkout, made at the first start and kept.
 * @param {string} folder the data folder
 * @returns {Secrets}
 */
export function readSecrets(folder) {
  const file = join(folder, 'secrets.json');
  if (existsSync(file)) {
    chmodSync(file, 0o600);
    return parseSecrets(file);
  }
  if (existsSync(join(folder, 'cluster')))
    throw new SetupFailure(
      `${file} is missing, and the database beside it opens only with it. Put it back, or move ${folder} away to begin anew.`,
    );
  const secrets = newSecrets();
  const unfinished = `${file}.unfinished`;
  writeFileSync(unfinished, `${JSON.stringify(secrets, null, 2)}\n`, { mode: 0o600 });
  renameSync(unfinished, file);
  return secrets;
}

/**
 * @param {string} file
 * @returns {Secrets}
 */
function parseSecrets(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    throw new SetupFailure(`${file} cannot be read. Put back the file that Evenhead wrote.`);
  }
}
