import { type ChildProcess, spawn } from 'node:child_process';
import { chmodSync, copyFileSync, cpSync, mkdirSync, mkdtempSync, readdirSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { runningServer } from '@/lib/setup/cluster-folder.mjs';

const root = fileURLToPath(new URL('../..', import.meta.url));

export interface StartedRun {
  child: ChildProcess;
  output: () => string;
  /** Resolves when the output holds the text; rejects when the program ends first. */
  until: (text: string) => Promise<void>;
  ended: Promise<number | null>;
}

/**
 * A folder with the real set-up, the real packages and a PostgreSQL of its own; only the application is a stand-in, so that
 * a start takes a second and not a build.
 */
export class SmallCheckout {
  readonly folder = mkdtempSync(join(tmpdir(), 'evenhead-checkout-'));
  readonly clusterFolder = join(this.folder, '.data/cluster');
  private readonly started: ChildProcess[] = [];

  constructor() {
    chmodSync(this.folder, 0o755);
    cpSync(join(root, 'lib/setup'), this.path('lib/setup'), { recursive: true });
    for (const file of ['package.json', 'package-lock.json', '.gitignore']) copyFileSync(join(root, file), this.path(file));
    this.write('db/demo-sign-ins.json', JSON.stringify([{ email: 'designer@example.test', password: 'open-sesame', who: 'the designer' }]));
    copyFileSync(join(root, 'tests/make/migrate-stand-in.ts'), this.path('db/migrate.ts'));
    // What runs beside the pages is bundled for real; here there is nothing in it.
    for (const worker of ['service-worker', 'procedure-worker']) this.write(`lib/workers/${worker}.ts`, 'export {};\n');
    this.linkPackages();
  }

  path(relative: string): string {
    return join(this.folder, relative);
  }

  write(relative: string, text: string): void {
    mkdirSync(dirname(this.path(relative)), { recursive: true });
    writeFileSync(this.path(relative), text);
  }

  /** Node finds each package at its real place, with what it needs beside it. */
  private linkPackages(): void {
    const packages = join(root, 'node_modules');
    mkdirSync(this.path('node_modules'));
    copyFileSync(join(packages, '.package-lock.json'), this.path('node_modules/.package-lock.json'));
    for (const name of readdirSync(packages).filter((entry) => !entry.startsWith('.') && entry !== 'next'))
      symlinkSync(join(packages, name), this.path(`node_modules/${name}`));
    this.write('node_modules/next/package.json', '{ "name": "next", "type": "module" }');
    mkdirSync(this.path('node_modules/next/dist/bin'), { recursive: true });
    copyFileSync(join(root, 'tests/make/next-stand-in.mjs'), this.path('node_modules/next/dist/bin/next'));
  }

  start(env: Record<string, string>): StartedRun {
    const { DATABASE_URL: _ours, ...inherited } = process.env;
    const child = spawn(process.execPath, [this.path('lib/setup/start.mjs')], { cwd: this.folder, env: { ...inherited, ...env } });
    this.started.push(child);
    let text = '';
    const watchers = new Set<() => void>();
    for (const stream of [child.stdout, child.stderr])
      stream.on('data', (chunk) => {
        text += chunk;
        watchers.forEach((watch) => watch());
      });
    const ended = new Promise<number | null>((resolve) => child.on('exit', resolve));
    const until = (wanted: string) =>
      new Promise<void>((resolve, reject) => {
        const watch = () => text.includes(wanted) && resolve();
        watchers.add(watch);
        watch();
        void ended.then(() => reject(new Error(`ended before "${wanted}":\n${text}`)));
      });
    return { child, output: () => text, until, ended };
  }

  async startAndWait(env: Record<string, string>): Promise<StartedRun> {
    const run = this.start(env);
    await run.until('stop it with Ctrl-C');
    return run;
  }

  /** Ends what the tests left running, and the folder. */
  async remove(): Promise<void> {
    for (const child of this.started.filter(({ exitCode, signalCode }) => exitCode === null && signalCode === null)) {
      const ended = new Promise((resolve) => child.on('exit', resolve));
      child.kill('SIGTERM');
      await ended;
    }
    const server = runningServer(this.clusterFolder);
    if (server) process.kill(server.pid, 'SIGQUIT');
    while (runningServer(this.clusterFolder)) await new Promise((resolve) => setTimeout(resolve, 50));
    rmSync(this.folder, { recursive: true, force: true });
  }
}
