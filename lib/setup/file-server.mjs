import { mkdirSync } from 'node:fs';
import { freePort } from './ports.mjs';

const BUCKET = 'evenhead';

/** @typedef {{ S3_ENDPOINT: string, S3_BUCKET: string, S3_REGION: string, S3_ACCESS_KEY_ID: string, S3_SECRET_ACCESS_KEY: string }} FileStore */

/**
 * A store for photos and certificates on a machine without one: it speaks the language of the hosted service on this machine alone
 * and keeps the files in a folder.
 * @param {string} folder
 * @returns {Promise<{ store: FileStore, stop: () => Promise<void> }>}
 */
export async function startFileServer(folder) {
  const { default: S3rver } = await import('s3rver');
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  const port = await freePort();
  const server = new S3rver({
    port,
    address: '127.0.0.1',
    silent: true,
    directory: folder,
    configureBuckets: [{ name: BUCKET, configs: [] }],
  });
  await server.run();
  return {
    store: {
      S3_ENDPOINT: `http://127.0.0.1:${port}`,
      S3_BUCKET: BUCKET,
      S3_REGION: 'us-east-1',
      // The keys that the local store knows; it listens to this machine alone.
      S3_ACCESS_KEY_ID: 'S3RVER',
      S3_SECRET_ACCESS_KEY: 'S3RVER',
    },
    stop: () => server.close(),
  };
}
