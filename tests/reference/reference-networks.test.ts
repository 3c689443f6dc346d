import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { balance } from '@/lib/hydraulics/balance';
import { solve } from '@/lib/hydraulics/solve';
import type { Method, NetworkDocument } from '@/lib/hydraulics/types';

interface Expected {
  solve: { links: Record<string, { flowLs: number; dropKpa: number }>; nodes: Record<string, number> };
  balance?: {
    pump: { id: string; flowLs: number; requiredHeadM: number };
    valves: Record<string, { flowLs: number; dropKpa: number; kv: number; setting: number; open: boolean }>;
  };
}

const folder = new URL('./data/networks/', import.meta.url);
const read = <T>(file: string) => JSON.parse(readFileSync(new URL(file, folder), 'utf8')) as T;
const names = readdirSync(folder)
  .filter((file) => file.endsWith('.expected.json'))
  .map((file) => file.replace('.expected.json', ''));

// Solved by a Newton iteration on all heads and flows at once and a linear programme, neither of which forms loops.
describe.each(names)('reference network %s', (name) => {
  const document = read<NetworkDocument>(`${name}.json`);
  const expected = read<Expected>(`${name}.expected.json`);

  it.each<Method>(['hardy-cross', 'simultaneous'])('agrees in every flow, drop and pressure by %s', (method) => {
    const result = solve({ ...document, options: { method } });
    expect(result.converged).toBe(true);
    expect(result.method).toBe(method);
    for (const link of result.links) {
      const { flowLs, dropKpa } = expected.solve.links[link.id];
      expect(Math.abs(link.flowLs - flowLs)).toBeLessThan(1e-6);
      expect(Math.abs(link.dropKpa - dropKpa)).toBeLessThan(1e-4);
    }
    for (const node of result.nodes) expect(Math.abs(node.pressureKpa - expected.solve.nodes[node.id])).toBeLessThan(1e-4);
  });

  it.runIf(expected.balance)('agrees in pump duty and every valve setting', () => {
    const { pump, valves } = expected.balance!;
    const result = balance(document);
    expect(result.converged).toBe(true);
    expect(result.pumps[0].flowLs).toBeCloseTo(pump.flowLs, 5);
    expect(result.pumps[0].requiredHeadM).toBeCloseTo(pump.requiredHeadM, 5);
    expect(result.valves).toHaveLength(Object.keys(valves).length);
    for (const valve of result.valves) {
      const { flowLs, dropKpa, kv, setting, open } = valves[valve.id];
      expect(Math.abs(valve.flowLs - flowLs)).toBeLessThan(2e-6);
      expect(Math.abs(valve.dropKpa - dropKpa)).toBeLessThan(2e-4);
      expect(Math.abs(valve.kv - kv)).toBeLessThan(2e-5);
      expect(Math.abs(valve.setting - setting)).toBeLessThan(1e-4);
      expect(valve.state).toBe(open ? 'open' : 'throttled');
    }
    for (const terminal of result.terminals) expect(terminal.percentOfDesign).toBeCloseTo(100, 4);
  });
});

it('there are eight reference networks', () => expect(names).toHaveLength(8));
