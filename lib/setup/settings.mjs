import { SetupFailure } from './failure.mjs';

/** @typedef {{ command: string, host: string, port: number, address: string, publicUrl: string, databaseUrl?: string, smtpUrl?: string, hasBucket: boolean, authSecret?: string }} Settings */

/**
 * What the environment says. Each variable that is set replaces what we would otherwise set up ourselves.
 * @param {{ command: string, defaultPort: number, env?: NodeJS.ProcessEnv }} options
 * @returns {Settings}
 */
export function readSettings({ command, defaultPort, env = process.env }) {
  const host = env.HOST || '127.0.0.1';
  const port = readPort(env.PORT, defaultPort);
  const address = `http://${reachable(host)}:${port}`;
  return {
    command,
    host,
    port,
    address,
    publicUrl: readUrl('PUBLIC_URL', env.PUBLIC_URL, ['http:', 'https:'])?.replace(/\/$/, '') ?? address,
    databaseUrl: readUrl('DATABASE_URL', env.DATABASE_URL, ['postgres:', 'postgresql:']),
    smtpUrl: readUrl('SMTP_URL', env.SMTP_URL, ['smtp:', 'smtps:']),
    // The SDK reads the rest of it itself.
    hasBucket: Boolean(env.S3_BUCKET),
    authSecret: readSecret(env.AUTH_SECRET),
  };
}

/**
 * @param {string | undefined} text
 * @param {number} otherwise
 */
function readPort(text, otherwise) {
  if (!text) return otherwise;
  const port = Number(text);
  if (Number.isInteger(port) && port > 0 && port < 65536) return port;
  throw new SetupFailure(`PORT=${text} is not a port. Give a number from 1 to 65535.`);
}

/**
 * @param {string} name
 * @param {string | undefined} text
 * @param {string[]} schemes
 */
function readUrl(name, text, schemes) {
  if (!text) return undefined;
  if (URL.canParse(text) && schemes.includes(new URL(text).protocol)) return text;
  // The value itself is not printed: it may hold a password.
  throw new SetupFailure(`${name} is not a URL that begins with ${schemes.map((scheme) => `${scheme}//`).join(' or ')}.`);
}

/**
 * The address at which this machine reaches a server that listens on `host`.
 * @param {string} host
 */
function reachable(host) {
  if (host === '0.0.0.0' || host === '::') return '127.0.0.1';
  return host.includes(':') ? `[${host}]` : host;
}

/** @param {string | undefined} text */
function readSecret(text) {
  if (!text) return undefined;
  if (text.length >= 32) return text;
  throw new SetupFailure(
    'AUTH_SECRET is too short to sign sessions with. Give 32 characters or more, for example from `openssl rand -base64 32`.',
  );
}

/**
 * Whether only this machine can reach a host of that name.
 * @param {string} host
 */
export const isLoopback = (host) => ['127.0.0.1', 'localhost', '::1', '[::1]'].includes(host);
