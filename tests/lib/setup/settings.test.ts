import { describe, expect, it } from 'vitest';
import { SetupFailure } from '@/lib/setup/failure.mjs';
import { readSettings } from '@/lib/setup/settings.mjs';

const read = (env: Record<string, string>) => readSettings({ command: 'npm start', defaultPort: 4300, env: { NODE_ENV: 'test', ...env } });

describe('the settings of a start', () => {
  it('serve this machine alone on the usual port when nothing is said', () => {
    expect(read({})).toMatchObject({ host: '127.0.0.1', port: 4300, address: 'http://127.0.0.1:4300', publicUrl: 'http://127.0.0.1:4300' });
  });

  it('a server for all addresses is still reached on the loopback', () => {
    expect(read({ HOST: '0.0.0.0', PORT: '8080' }).address).toBe('http://127.0.0.1:8080');
    expect(read({ HOST: '::1' }).address).toBe('http://[::1]:4300');
  });

  it('the public address is told without a closing slash', () => {
    expect(read({ PUBLIC_URL: 'https://evenhead.example/' }).publicUrl).toBe('https://evenhead.example');
  });

  it.each(['0', '65536', '43.5', '-1', 'http'])('PORT=%s is refused', (PORT) => {
    expect(() => read({ PORT })).toThrow(SetupFailure);
  });

  it('a bad database URL is refused without being printed, for it may hold a password', () => {
    expect(() => read({ DATABASE_URL: 'mysql://root:hunter2@db/x' })).toThrow(
      'DATABASE_URL is not a URL that begins with postgres:// or postgresql://.',
    );
    expect(() => read({ SMTP_URL: 'mail.example' })).toThrow('SMTP_URL is not a URL that begins with smtp:// or smtps://.');
  });
});
