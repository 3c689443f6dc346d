import { describe, expect, it } from 'vitest';
import { dropAtDesignKpa, flowFromDrop } from '@/lib/commissioning/reading-flow';
import { shutOffDropKpa } from '@/lib/commissioning/shut-off';

const pump = (speed?: number) => ({ kind: 'pump', speed, curve: [0, 2, 4].map((flowLs) => ({ flowLs, headM: 10 - flowLs })) });

describe('the drop that pumps give at no flow', () => {
  it('is rho g H: 10 m of water at 1000 kg/m³ are 98.07 kPa (standard gravity 9.80665 m/s²)', () => {
    expect(shutOffDropKpa([pump()], 1000)).toBeCloseTo(98.0665, 9);
  });

  it('goes with the square of the speed and adds up over pumps', () => {
    expect(shutOffDropKpa([pump(0.5)], 1000)).toBeCloseTo(98.0665 / 4, 9);
    expect(shutOffDropKpa([pump(), pump(), { kind: 'pipe' }], 1000)).toBeCloseTo(2 * 98.0665, 9);
  });

  it('is not known where there is no pump', () => {
    expect(shutOffDropKpa([{ kind: 'pipe' }], 1000)).toBeNull();
  });
});

describe('the drop that shows at design flow', () => {
  const at = {
    kvTable: [
      { setting: 0, kv: 0 },
      { setting: 4, kv: 4 },
    ],
    densityKgM3: 998,
  };

  it('read back across the valve is the design flow', () => {
    const dropKpa = dropAtDesignKpa({ ...at, settingTurns: 2.5 }, 0.3)!;
    expect(flowFromDrop({ ...at, settingTurns: 2.5, dropKpa })).toMatchObject({ ok: true, flowLs: expect.closeTo(0.3, 12) });
  });

  it('is not known for a shut valve or a setting beyond the table', () => {
    expect(dropAtDesignKpa({ ...at, settingTurns: 0 }, 0.3)).toBeNull();
    expect(dropAtDesignKpa({ ...at, settingTurns: 5 }, 0.3)).toBeNull();
  });
});
