import { expect, it } from 'vitest';
import { sizeLiquidValve } from '@/lib/hydraulics/liquid-valve-sizing';
import { askPython, hasPythonLibrary } from './python-libraries';

const SCRIPT = `
from fluids.control_valve import size_control_valve_l
out = []
for q, p1, p2, fl in rows:
    r = size_control_valve_l(965.4, 70.1e3, 22120e3, 3.1e-4, p1 * 1e3, p2 * 1e3, q / 3600, FL=fl, full_output=True)
    out.append([r["Kv"], r["choked"], r["FF"]])
print(json.dumps(out))
`;

it('liquid valves are sized as by python3-fluids, choked or not', ({ skip }) => {
  skip(!hasPythonLibrary('fluids'), 'needs python3-fluids');
  const rows = [0.5, 20, 300].flatMap((flow) =>
    [200, 680, 1600].flatMap((inlet) =>
      [0.1, 0.4, 0.7, 0.9].flatMap((share) => [0.45, 0.7, 0.95].map((fl) => [flow, inlet, inlet * share, fl])),
    ),
  );
  const theirs = askPython<[number, boolean, number][]>(SCRIPT, rows);
  rows.forEach(([flowM3h, inletKpaAbs, outletKpaAbs, recoveryFactor], i) => {
    const fluid = { densityKgM3: 965.4, vapourKpaAbs: 70.1, criticalKpaAbs: 22120 };
    const result = sizeLiquidValve({ ...fluid, flowM3h, inletKpaAbs, outletKpaAbs, recoveryFactor });
    if (!result.ok) throw new Error(result.error.message);
    const [kv, choked, criticalPressureRatio] = theirs[i];
    expect(result.valve.choked).toBe(choked);
    // Both refer density to water at 15 °C, stated to six and to sixteen figures.
    expect(Math.abs(result.valve.kv / kv - 1)).toBeLessThan(1e-6);
    expect(result.valve.criticalPressureRatio).toBeCloseTo(criticalPressureRatio, 12);
  });
});
