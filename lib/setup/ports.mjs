import { createServer } from 'node:net';
import { SetupFailure } from './failure.mjs';

/**
 * @param {number} port 0 lets the system choose
 * @param {string} [host]
 * @returns {Promise<number>} the port, free at this moment
 */
function listenOnce(port, host = '127.0.0.1') {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once('error', reject);
    server.listen({ port, host, exclusive: true }, () => {
      const address = /** @type {import('node:net').AddressInfo} */ (server.address());
      server.close(() => resolve(address.port));
    });
  });
}

/** A port of the loopback that nobody listens on. */
export const freePort = () => listenOnce(0);

/**
 * The port that was used the last time, so that a bookmark of a database tool stays right; another one if it is taken.
 * @param {number | null} remembered
 */
export async function freePortLike(remembered) {
  if (!remembered) return freePort();
  return listenOnce(remembered).catch(freePort);
}

/**
 * @param {number} port
 * @param {string} host
 * @param {string} command how the person started us, for the advice
 */
export async function requireFreePort(port, host, command) {
  try {
    await listenOnce(port, host);
  } catch (error) {
    const code = /** @type {NodeJS.ErrnoException} */ (error).code;
    const other = port < 1024 ? 4300 : port + 1;
    if (code === 'EADDRINUSE')
      throw new SetupFailure(`Port ${port} on ${host} is in use. Stop the program that uses it, or take another: PORT=${other} ${command}`);
    if (code === 'EACCES') throw new SetupFailure(`Port ${port} is not allowed for this user. Take another: PORT=${other} ${command}`);
    if (code === 'EADDRNOTAVAIL' || code === 'ENOTFOUND' || code === 'EAI_AGAIN')
      throw new SetupFailure(`HOST=${host} is not an address of this machine. Leave HOST out to serve this machine alone.`);
    throw error;
  }
}
