import { mkdtempSync, readdirSync, readFileSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { simpleParser } from 'mailparser';
import { createTransport } from 'nodemailer';
import { afterAll, expect, it } from 'vitest';
import { startMailServer } from '@/lib/setup/mail-server.mjs';

const folder = mkdtempSync(join(tmpdir(), 'evenhead-mail-'));
afterAll(() => rmSync(folder, { recursive: true }));

it('a message sent to the local mail server is a file that a mail program opens, and only its owner can', async () => {
  const server = await startMailServer(folder);
  const sender = createTransport(server.url);
  await sender.sendMail({
    from: 'evenhead@example.test',
    to: "owner'plant@example.test",
    subject: 'Prüfbericht',
    text: 'Ready to accept.\n.\nEnd',
  });
  await sender.sendMail({ from: 'evenhead@example.test', to: 'designer@example.test', subject: 'Second', text: 'Again' });
  sender.close();
  await server.stop();

  const files = readdirSync(folder).sort();
  expect(files).toHaveLength(2);
  expect(files[0]).toMatch(/-0001-owner_plant@example\.test\.eml$/);
  expect(statSync(join(folder, files[0])).mode & 0o777).toBe(0o600);
  const message = await simpleParser(readFileSync(join(folder, files[0])));
  expect(message.subject).toBe('Prüfbericht');
  expect(message.text?.trim()).toBe('Ready to accept.\n.\nEnd');
});
