import type { AddressInfo } from 'node:net';
import { simpleParser, type ParsedMail } from 'mailparser';
import { SMTPServer } from 'smtp-server';
import { afterAll, beforeAll } from 'vitest';

/** Gives the suite a mail server of its own as SMTP_URL, and keeps the letters that it takes. Call it once at the top of a test file. */
export function withMail() {
  const letters: ParsedMail[] = [];
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    onData: (stream, _session, done) => {
      simpleParser(stream).then((letter) => {
        letters.push(letter);
        done();
      }, done);
    },
  });

  beforeAll(async () => {
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', () => resolve()));
    process.env.SMTP_URL = `smtp://127.0.0.1:${(server.server.address() as AddressInfo).port}`;
    process.env.PUBLIC_URL = 'https://site.example';
  });
  afterAll(() => new Promise<void>((resolve) => server.close(() => resolve())));

  const lettersTo = (address: string) => letters.filter(({ to }) => [to].flat().some((it) => it?.text === address));
  const tokenTo = (address: string) => /\/password\?token=(\S+)/.exec(lettersTo(address).at(-1)?.text ?? '')?.[1] ?? null;
  return { letters, lettersTo, tokenTo };
}
