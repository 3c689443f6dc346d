import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { balance } from '@/lib/hydraulics/balance';
import { size } from '@/lib/hydraulics/size';
import { solve } from '@/lib/hydraulics/solve';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import { parseNetworkDocument, type Purpose } from '@/lib/network/document';
import { numbersFrom, passiveKinds, randomMesh } from '../make/any-network';
import { houseExample } from '../make/house-example';

const MUTATIONS = 10_000;
/** Processor time that one document may take: unlike the clock it does not grow with what else the machine does. The slowest takes about 0.13 s. */
const MOST_CPU_S = 1;

type Json = null | boolean | number | string | Json[] | { [key: string]: Json };

const folder = new URL('./data/networks/', import.meta.url);
const stored = readdirSync(folder)
  .filter((file) => !file.includes('expected'))
  .map((file) => readFileSync(new URL(file, folder), 'utf8'));
const withController = houseExample();
withController.links.push({ id: 'DPC', kind: 'dpController', from: 'n3', to: 'X', setpointKpa: 12, sense: ['n2', 'X'], kvs: 2 });
const texts = [
  ...stored,
  JSON.stringify(withController),
  ...[1, 2, 3].map((seed) => JSON.stringify(randomMesh(seed, 8, 5, passiveKinds, 2))),
].map(readyToSize);

/** Every document also asks for sizes, so that all three commands have work. */
function readyToSize(text: string, k: number): string {
  const document = JSON.parse(text) as NetworkDocument;
  const links = document.links.map((link) => (link.kind === 'pipe' ? { ...link, size: true, series: 'steel-asme-sch40' } : link));
  const method = k % 2 ? 'hardy-cross' : undefined;
  return JSON.stringify({ ...document, links, options: { method, sizing: { maxPaPerM: 300, maxVelocityMs: 1.5 } } });
}

/** Every place of a value inside another: its holder and key. */
function places(value: Json): { holder: Record<string, Json>; key: string }[] {
  if (typeof value !== 'object' || value === null) return [];
  const holder = value as Record<string, Json>;
  return Object.keys(holder).flatMap((key) => [{ holder, key }, ...places(holder[key])]);
}

/** Changes one place: to something odd, to another place's value, away, doubled, or a number to another size. */
function mutate(document: Json, random: () => number): void {
  const all = places(document);
  if (random() < 0.6) {
    const numbers = all.filter(({ holder, key }) => typeof holder[key] === 'number');
    const { holder, key } = numbers[Math.floor(random() * numbers.length)];
    holder[key] = (holder[key] as number) * 10 ** (12 * random() - 6);
    return;
  }
  const { holder, key } = all[Math.floor(random() * all.length)];
  const other = all[Math.floor(random() * all.length)];
  const value = holder[key];
  const odd: Json[] = [null, true, '', 'pump', 0, -1, 1e-12, 1e300, -0, [], {}, [null], 1e9, 1e-9, 0.5, 'X'];
  const kind = random();
  if (kind < 0.3) holder[key] = odd[Math.floor(random() * odd.length)];
  else if (kind < 0.5) holder[key] = structuredClone(other.holder[other.key]);
  else if (kind < 0.6 && !Array.isArray(holder)) delete holder[key];
  else if (Array.isArray(value) && value.length && kind < 0.8) value.push(structuredClone(value[Math.floor(random() * value.length)]));
  else if (typeof value === 'number') holder[key] = value * 10 ** (18 * random() - 9);
  else if (Array.isArray(value)) value.splice(Math.floor(random() * value.length), 1);
  else holder[key] = odd[Math.floor(random() * odd.length)];
}

const commands: Record<Purpose, (document: NetworkDocument) => object> = { solve, balance, size };

const cpuSeconds = (since: NodeJS.CpuUsage) => {
  const { user, system } = process.cpuUsage(since);
  return (user + system) / 1e6;
};

/** Whether any number inside is not finite. */
const hasBadNumber = (value: unknown): boolean =>
  typeof value === 'number'
    ? !Number.isFinite(value)
    : typeof value === 'object' && value !== null && Object.values(value).some(hasBadNumber);

describe('a damaged document', () => {
  it(
    'is given a result of finite numbers or a named error within a second of processor time, ten thousand times',
    { timeout: 600_000 },
    () => {
      const random = numbersFrom(2026);
      let refused = 0;
      for (let k = 0; k < MUTATIONS; k++) {
        const document = JSON.parse(texts[k % texts.length]) as Json;
        for (let m = 0; m <= 2 * random(); m++) mutate(document, random);
        const purpose = (['solve', 'solve', 'balance', 'size'] as const)[k % 4];
        const begun = process.cpuUsage();
        const parsed = parseNetworkDocument(document, purpose);
        if (parsed.ok) {
          const result = commands[purpose](parsed.document);
          if (hasBadNumber(result)) throw new Error(`not finite: ${JSON.stringify(document)}`);
        } else {
          refused++;
          expect(parsed.error.code).toMatch(/^[a-z-]+$/);
          expect(parsed.error.issues.length).toBeGreaterThan(0);
          for (const issue of parsed.error.issues) expect(issue.message).not.toBe('');
        }
        const took = cpuSeconds(begun);
        if (took > MOST_CPU_S) throw new Error(`${took} s: ${JSON.stringify(document)}`);
      }
      expect(refused).toBeGreaterThan(MUTATIONS / 10);
      expect(refused).toBeLessThan(MUTATIONS * 0.9);
    },
  );
});
