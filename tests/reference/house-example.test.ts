import { describe, expect, it } from 'vitest';
import { balance } from '@/lib/hydraulics/balance';
import { solve } from '@/lib/hydraulics/solve';
import { type HouseExample, houseExample } from '../make/house-example';

function terminalFlows(example: HouseExample, ids = ['T1', 'T2', 'T3']): number[] {
  const result = solve(houseExample(example));
  expect(result.converged).toBe(true);
  return ids.map((id) => result.links.find((link) => link.id === id)!.flowLs);
}

// Constructed network; the figures were computed with scipy from the same laws, see tests/make/house-example.ts.
describe('three terminals on direct return', () => {
  it.each<[string, HouseExample, number[]]>([
    ['valves set: design flow everywhere', {}, [0.5, 0.3, 0.2]],
    ['valves wide open: near terminals take too much', { kv: [9, 6, 4.1569219382] }, [0.5697, 0.3178, 0.1865]],
    ['the second throttled to the ratio of the third', { kv: [9, 3.415259873, 4.1569219382] }, [0.5781, 0.2872, 0.1915]],
    ['main strainer fouled: all fall by one ratio', { firstMain: 40 }, [0.40825, 0.24495, 0.1633]],
    ['first main doubled', { firstMain: 20 }, [0.4629, 0.2777, 0.1852]],
    ['second coil fouled: others rise', { secondTerminal: 4 * 222.2222222 }, [0.5241, 0.1876, 0.2166]],
    ['second circuit shut: those beyond rise more', { closed: 'T2' }, [0.56068, 0, 0.23907]],
    ['bypass left open at the first tee', { bypass: 20 }, [0.29714, 0.17828, 0.11885]],
    ['pump running backwards', { pump: (q) => (24 - 40 * q * q > -60 ? 24 - 40 * q * q : -60) }, [0.26568, 0.15941, 0.10627]],
  ])('%s', (_, example, exact) => {
    terminalFlows(example).forEach((flow, k) => expect(flow).toBeCloseTo(exact[k], 4));
  });

  it('balance finds the valve coefficients by hand calculation', () => {
    const result = balance(houseExample({ kv: [9, 6, 4.1569219382] }));
    expect(result.converged).toBe(true);
    expect(result.indexTerminal).toBe('T3');
    expect(result.pumps[0].requiredHeadM * 9.80665).toBeCloseTo(45, 3);
    expect(result.pumps[0].speed).toBeCloseTo(1, 4);
    expect(result.valves.map((valve) => valve.state)).toEqual(['throttled', 'throttled', 'open']);
    [4.64758, 3.41526, 4.15692].forEach((kv, k) => expect(result.valves[k].kv).toBeCloseTo(kv, 4));
    for (const terminal of result.terminals) expect(terminal.percentOfDesign).toBeCloseTo(100, 2);
  });
});
