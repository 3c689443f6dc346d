import { mkdirSync, renameSync } from 'node:fs';
import { writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { freePort } from './ports.mjs';

/**
 * A mail server for a machine without one: it delivers nothing and keeps each message as a file to open in a mail program.
 * @param {string} folder
 * @returns {Promise<{ url: string, stop: () => Promise<void> }>}
 */
export async function startMailServer(folder) {
  const { SMTPServer } = await import('smtp-server');
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  const port = await freePort();
  let count = 0;
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    onData(stream, session, done) {
      count += 1;
      const name = fileName(count, session.envelope.rcptTo[0]?.address ?? 'nobody');
      keep(stream, folder, name).then(() => done(), done);
    },
  });
  await new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', () => resolve(undefined));
  });
  // A sender that hangs up in the middle is the sender's trouble, not a reason to stop everything.
  server.on('error', (error) => console.error(`mail server: ${error.message}`));
  return { url: `smtp://127.0.0.1:${port}`, stop: () => new Promise((resolve) => server.close(() => resolve())) };
}

/**
 * @param {number} count
 * @param {string} recipient
 */
function fileName(count, recipient) {
  const time = new Date().toISOString().replaceAll(':', '-');
  return `${time}-${String(count).padStart(4, '0')}-${recipient.replace(/[^\w.@+-]/g, '_')}.eml`;
}

/**
 * Whoever looks into the folder sees whole messages only.
 * @param {AsyncIterable<Buffer>} stream
 * @param {string} folder
 * @param {string} name
 */
async function keep(stream, folder, name) {
  const unfinished = join(folder, `.${name}`);
  await writeFile(unfinished, stream, { mode: 0o600 });
  renameSync(unfinished, join(folder, name));
}
