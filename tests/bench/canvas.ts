import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import path from 'node:path';
import tailwind from '@tailwindcss/postcss';
import { chromium, type Browser, type Page } from '@playwright/test';
import { build } from 'esbuild';
import postcss from 'postcss';
import { places, type Place } from './canvas/places';
import type { Suite } from './run';

const TERMINALS = 1_000;
const RUNS = 3;
const SECONDS = 3;
const VIEW = { width: 1440, height: 900 };

const flags = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

const median = (values: number[]) => values.toSorted((a, b) => a - b)[values.length >> 1];
const rounded = (value: number, digits = 3) => Number(value.toPrecision(digits));

/**
 * The canvas of the product with 1,000 terminals beside a bare React Flow with as many default nodes and edges: until something is painted after
 * the page is asked for, and frames a second while the view is panned and zoomed, in Chromium with software drawing, by turns, medians. Both are
 * bundled for production from the real components. `fps`, `bareFps` and `ratio` are those of the place where the ratio is worst.
 */
export async function canvasSuite(): Promise<Suite> {
  const folder = mkdtempSync(path.join(tmpdir(), 'canvas-'));
  const server = await serve(folder);
  const browser = await chromium.launch({ executablePath: '/usr/bin/chromium', args: flags });
  try {
    const address = `http://127.0.0.1:${(server.address() as AddressInfo).port}/?terminals=${TERMINALS}`;
    const opened = { ours: [] as number[], bare: [] as number[] };
    const frames = { ours: noFrames(), bare: noFrames() };
    for (let run = 0; run < RUNS; run++) {
      for (const which of ['ours', 'bare'] as const) {
        const page = await openPage(browser, which === 'bare' ? `${address}&bare` : address);
        opened[which].push(await page.evaluate(() => window.openedMs));
        for (const place of places)
          frames[which][place].push(await page.evaluate(([at, seconds]) => window.framesPerSecond(at, seconds), [place, SECONDS] as const));
        await page.close();
      }
    }
    const rows = places.map((place) => {
      const [fps, bareFps] = [median(frames.ours[place]), median(frames.bare[place])];
      return { place, fps: rounded(fps), bareFps: rounded(bareFps), ratio: rounded(fps / bareFps) };
    });
    const worst = rows.reduce((a, b) => (b.ratio < a.ratio ? b : a));
    const { fps, bareFps, ratio } = worst;
    return {
      suite: 'canvas',
      terminals: TERMINALS,
      openMs: Math.round(median(opened.ours)),
      bareOpenMs: Math.round(median(opened.bare)),
      fps,
      bareFps,
      ratio,
      rows,
    };
  } finally {
    await browser.close();
    server.close();
    rmSync(folder, { recursive: true });
  }
}

const noFrames = (): Record<Place, number[]> => ({ fit: [], middle: [], near: [] });

async function openPage(browser: Browser, address: string): Promise<Page> {
  const page = await browser.newPage({ viewport: VIEW });
  const broken = new Promise<never>((_, reject) => page.once('pageerror', reject));
  await page.goto(address);
  await Promise.race([broken, page.waitForFunction(() => window.openedMs > 0)]);
  broken.catch(() => undefined);
  return page;
}

/** Bundles the two pages with the styles of the product and serves them to this machine alone. */
async function serve(folder: string) {
  const root = process.cwd();
  await build({
    entryPoints: [path.join(root, 'tests/bench/canvas/pages.tsx')],
    outfile: path.join(folder, 'pages.js'),
    bundle: true,
    minify: true,
    format: 'esm',
    jsx: 'automatic',
    alias: { '@': root },
    define: { 'process.env.NODE_ENV': '"production"' },
    logLevel: 'error',
  });
  const styles = path.join(root, 'app/globals.css');
  const { css } = await postcss([tailwind()]).process(readFileSync(styles, 'utf8'), { from: styles });
  writeFileSync(path.join(folder, 'product.css'), css);
  const page = `<!doctype html><html data-theme="light"><link rel="stylesheet" href="/product.css"><link rel="stylesheet" href="/pages.css"><style>html,body,#sheet{margin:0;height:100%;position:relative}</style><div id="sheet"></div><script type="module" src="/pages.js"></script>`;
  const types: Record<string, string> = { '.css': 'text/css', '.js': 'text/javascript' };
  const server = createServer(({ url = '/' }, response) => {
    const name = path.basename(new URL(url, 'http://127.0.0.1').pathname);
    const type = types[path.extname(name)];
    response.setHeader('content-type', type ?? 'text/html; charset=utf-8');
    response.end(type ? readFileSync(path.join(folder, name)) : page);
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  return server;
}
