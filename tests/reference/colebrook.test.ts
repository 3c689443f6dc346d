import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { frictionFactor } from '@/lib/hydraulics/friction';
import { askPython, hasPythonLibrary } from './python-libraries';

interface Row {
  reynolds: number;
  relativeRoughness: number;
}

const table = readFileSync(new URL('./data/colebrook.csv', import.meta.url), 'utf8')
  .trim()
  .split('\n')
  .filter((line) => /^\d/.test(line))
  .map((line) => line.split(',').map(Number));

describe('friction factors', () => {
  it('agree with the stored table of python3-fluids', () => {
    expect(table.length).toBeGreaterThan(100);
    for (const [reynolds, relativeRoughness, factor] of table)
      expect(Math.abs(frictionFactor(reynolds, relativeRoughness) / factor - 1)).toBeLessThan(2e-7);
  });

  it.runIf(hasPythonLibrary('fluids'))(
    'agree with python3-fluids over the whole range (skipped where python3-fluids is not installed)',
    () => {
      const rows: Row[] = [];
      for (let k = 0; k < 400; k++)
        rows.push({ reynolds: 4000.5 * 10 ** ((k % 40) / 8), relativeRoughness: k < 40 ? 0 : 10 ** (-5 + (k / 400) * 3.6) });
      const factors = askPython<number[]>(
        `from fluids.friction import friction_factor\nprint(json.dumps([friction_factor(Re=r['reynolds'], eD=r['relativeRoughness'], Method='Colebrook') for r in rows]))`,
        rows,
      );
      rows.forEach(({ reynolds, relativeRoughness }, k) =>
        expect(Math.abs(frictionFactor(reynolds, relativeRoughness) / factors[k] - 1)).toBeLessThan(1e-9),
      );
    },
  );
});
