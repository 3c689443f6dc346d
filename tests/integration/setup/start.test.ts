import { randomBytes } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, statSync } from 'node:fs';
import { Client } from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { runningServer } from '@/lib/setup/cluster-folder.mjs';
import { freePort } from '@/lib/setup/ports.mjs';
import { SmallCheckout } from '../../make/small-checkout';

describe('npm start', () => {
  const checkout = new SmallCheckout();
  let port = 0;
  let env: Record<string, string> = {};
  const get = async (path: string) => (await fetch(`http://127.0.0.1:${port}${path}`)).json();

  beforeAll(async () => {
    port = await freePort();
    env = { PORT: String(port) };
  });
  afterAll(() => checkout.remove());

  it('sets everything up, says where it is and who may sign in, and stops without a trace at SIGTERM', async () => {
    const run = await checkout.startAndWait(env);
    expect(run.output()).toContain(`http://127.0.0.1:${port}`);
    expect(run.output()).toContain('designer@example.test  open-sesame  the designer');
    expect(await get('/readings')).toEqual(['from the demo']);
    await fetch(`http://127.0.0.1:${port}/readings`, { method: 'POST' });

    run.child.kill('SIGTERM');
    expect(await run.ended).toBe(0);
    expect(runningServer(checkout.clusterFolder)).toBeNull();
    await expect(fetch(`http://127.0.0.1:${port}/api/health`)).rejects.toThrow();
    expect(readdirSync(checkout.path('.data/runs'))).toEqual([]);
  });

  it('started again, it has everything that was entered, the same secret and no second build, in seconds', async () => {
    const secrets = readFileSync(checkout.path('.data/secrets.json'), 'utf8');
    const begun = Date.now();
    const run = await checkout.startAndWait(env);
    expect(Date.now() - begun).toBeLessThan(15_000);
    expect(await get('/readings')).toEqual(['from the demo', 'typed by a technician']);
    expect(readFileSync(checkout.path('.data/secrets.json'), 'utf8')).toBe(secrets);
    expect(readFileSync(checkout.path('.next/builds'), 'utf8')).toBe('built\n');
    const told = await get('/told');
    expect(told.NEXTAUTH_SECRET).toBe(JSON.parse(secrets).authSecret);
    expect(told.NEXTAUTH_URL).toBe(`http://127.0.0.1:${port}`);
    run.child.kill('SIGINT');
    expect(await run.ended).toBe(0);
  });

  it('keeps its secrets from other users', () => {
    expect(statSync(checkout.path('.data/secrets.json')).mode & 0o777).toBe(0o600);
    expect(statSync(checkout.clusterFolder).mode & 0o077).toBe(0);
  });

  it('builds again after an edit, committed or not', async () => {
    checkout.write('app/page.tsx', 'export default function Page() {}');
    const run = await checkout.startAndWait(env);
    expect(readFileSync(checkout.path('.next/builds'), 'utf8')).toBe('built\nbuilt\n');
    run.child.kill('SIGTERM');
    await run.ended;
  });

  it('a second start in the same folder names the first', async () => {
    const first = await checkout.startAndWait(env);
    const second = checkout.start({ PORT: String(await freePort()) });
    expect(await second.ended).toBe(1);
    expect(second.output()).toBe(
      `npm start already runs in this folder, at http://127.0.0.1:${port} (process ${first.child.pid}). Stop it with Ctrl-C first.\n`,
    );
    expect(await get('/readings')).toHaveLength(2);
    first.child.kill('SIGTERM');
    await first.ended;
  });
});

describe('npm start with services of its own', () => {
  const checkout = new SmallCheckout();
  const database = `evenhead_given_${randomBytes(6).toString('hex')}`;
  const managed = new URL(process.env.TEST_DATABASE_URL ?? process.env.DATABASE_URL ?? '');
  const asAdministrator = async (sql: string) => {
    const client = new Client({ connectionString: managed.toString() });
    await client.connect();
    await client.query(sql);
    await client.end();
  };

  beforeAll(() => asAdministrator(`create database ${database}`));
  afterAll(async () => {
    await checkout.remove();
    await asAdministrator(`drop database ${database}`);
  });

  it('uses the database, mail service, secret and public address that it is given, and starts none', async () => {
    const databaseUrl = Object.assign(new URL(managed), { pathname: `/${database}` }).toString();
    const port = await freePort();
    const given = {
      SMTP_URL: 'smtp://127.0.0.1:9',
      AUTH_SECRET: 'given-from-outside-and-long-enough',
      PUBLIC_URL: 'https://evenhead.example',
    };
    const run = await checkout.startAndWait({ PORT: String(port), DATABASE_URL: databaseUrl, ...given });
    const told = await (await fetch(`http://127.0.0.1:${port}/told`)).json();
    expect(told).toMatchObject({ ...given, DATABASE_URL: databaseUrl, NEXTAUTH_SECRET: given.AUTH_SECRET, NEXTAUTH_URL: given.PUBLIC_URL });
    expect(existsSync(checkout.clusterFolder)).toBe(false);
    expect(existsSync(checkout.path('.data/mail'))).toBe(false);
    // The demo's passwords are known to everyone: they have no place in a database that is not ours.
    expect(await (await fetch(`http://127.0.0.1:${port}/readings`)).json()).toEqual([]);
    run.child.kill('SIGTERM');
    expect(await run.ended).toBe(0);
  });
});
