import { describe, expect, it } from 'vitest';
import { unbalancedNodes } from '@/lib/hydraulics/inflows';
import type { NetworkLink } from '@/lib/hydraulics/types';
import { networkOfLinks, resistance } from '../../make/network-of-links';

const links: NetworkLink[] = [resistance('one', 'A', 'B', 10), resistance('two', 'B', 'C', 10), resistance('apart', 'D', 'E', 10)];

describe('inflows', () => {
  it('that sum to zero over each connected part are in order', () => {
    expect(unbalancedNodes(networkOfLinks(links, { A: 0.5, C: -0.5, D: -2, E: 2 }))).toEqual([]);
    expect(unbalancedNodes(networkOfLinks(links))).toEqual([]);
  });

  it('that do not are named, only those of that part, and only the nodes that have one', () => {
    expect(unbalancedNodes(networkOfLinks(links, { A: 0.5, C: -0.4, D: -2, E: 2 }))).toEqual(['A', 'C']);
    expect(unbalancedNodes(networkOfLinks(links, { A: 0.5, C: -0.5, D: 1 }))).toEqual(['D']);
    expect(unbalancedNodes(networkOfLinks(links, { A: -0.5, B: 0.4 }))).toEqual(['A', 'B']);
  });

  it('are told apart by what is open: a closed link divides', () => {
    const closed = links.map((link) => (link.id === 'two' ? { ...link, closed: true } : link));
    expect(unbalancedNodes(networkOfLinks(closed, { A: 0.5, C: -0.5 }))).toEqual(['A', 'C']);
    expect(unbalancedNodes(networkOfLinks(closed, { A: 0.5, B: -0.5 }))).toEqual([]);
  });

  it('may be off by rounding, of small flows 1e-6 L/s and of large ones 1e-9 of all that flows in and out', () => {
    expect(unbalancedNodes(networkOfLinks(links, { A: 0.5, C: -0.5 + 9e-7 }))).toEqual([]);
    expect(unbalancedNodes(networkOfLinks(links, { A: 0.5, C: -0.5 + 1.1e-6 }))).toEqual(['A', 'C']);
    expect(unbalancedNodes(networkOfLinks(links, { A: 5e4, C: -5e4 + 9e-5 }))).toEqual([]);
    expect(unbalancedNodes(networkOfLinks(links, { A: 5e4, C: -5e4 + 1.2e-4 }))).toEqual(['A', 'C']);
  });
});
