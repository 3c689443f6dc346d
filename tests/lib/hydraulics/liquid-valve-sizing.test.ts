import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { liquidCriticalPressureRatio, sizeLiquidValve, type LiquidSizing } from '@/lib/hydraulics/liquid-valve-sizing';

/** Water at 90 °C, 360 m³/h from 680 to 220 kPa: the standard's annex. */
const ANNEX: LiquidSizing = {
  flowM3h: 360,
  densityKgM3: 965.4,
  inletKpaAbs: 680,
  outletKpaAbs: 220,
  vapourKpaAbs: 70.1,
  criticalKpaAbs: 22120,
  recoveryFactor: 0.9,
};
const COLD: LiquidSizing = {
  flowM3h: 1.8,
  densityKgM3: 999.8,
  inletKpaAbs: 500,
  outletKpaAbs: 150,
  vapourKpaAbs: 1.2,
  recoveryFactor: 0.9,
};
const REDUCERS = { valveMm: 20, pipeInMm: 25, pipeOutMm: 25 };

function sized(input: LiquidSizing) {
  const result = sizeLiquidValve(input);
  if (!result.ok) throw new Error(result.error.message);
  return result.valve;
}

describe('liquid valve sizing by IEC 60534-2-1', () => {
  it('annex example 1 is not choked: Kv 165', () => {
    const valve = sized(ANNEX);
    expect(valve.kv).toBeCloseTo(164.995, 2);
    expect(valve.choked).toBe(false);
    expect(valve.criticalPressureRatio).toBeCloseTo(0.94424, 5);
    expect(valve.chokedDropKpa).toBeCloseTo(497.2, 1);
    expect(valve.pressureRatio).toBeCloseTo(460 / 609.9, 12);
    expect(valve.pipingFactor).toBe(1);
    expect(valve.warnings).toEqual([]);
  });

  it('annex example 2, F_L 0.6, is choked: Kv 238', () => {
    const valve = sized({ ...ANNEX, recoveryFactor: 0.6 });
    expect(valve.kv).toBeCloseTo(238.058, 2);
    expect(valve.choked).toBe(true);
    expect(valve.chokedDropKpa).toBeCloseTo(220.97, 2);
    expect(valve.warnings.map((warning) => warning.code)).toEqual(['choked']);
    expect(valve.warnings[0].message).toContain('choked');
  });

  // size_control_valve_l of the open fluids library 1.0.22.
  it('agrees with an independent implementation on chilled water, hot water and reducers', () => {
    const chilled = { flowM3h: 7.2, densityKgM3: 999.8, inletKpaAbs: 300, outletKpaAbs: 260, vapourKpaAbs: 1.2, recoveryFactor: 0.9 };
    expect(sized(chilled).kv).toBeCloseTo(11.3882, 4);
    const hot = { flowM3h: 7.2, densityKgM3: 971.8, inletKpaAbs: 250, outletKpaAbs: 60, vapourKpaAbs: 47.4, recoveryFactor: 0.85 };
    expect(sized(hot)).toMatchObject({ kv: expect.closeTo(5.8331, 4), choked: true });
    expect(sized({ ...COLD, reducers: REDUCERS })).toMatchObject({ kv: expect.closeTo(0.9628, 4), choked: false });
  });

  it('with reducers meets its own equation, F_P and choked F_LP alike', () => {
    const reducers = { valveMm: 50, pipeInMm: 100, pipeOutMm: 80 };
    const zetaIn = 0.5 * (1 - 0.25) ** 2 + (1 - 0.0625);
    const zetaBoth = zetaIn + (1 - 0.390625) ** 2 - (1 - 0.390625 ** 2);
    const free = sized({ ...COLD, flowM3h: 60, reducers });
    const fp = 1 / Math.sqrt(1 + (zetaBoth / 0.0016) * (free.kv / 2500) ** 2);
    expect(free.pipingFactor).toBeCloseTo(fp, 12);
    expect(0.1 * fp * free.kv * Math.sqrt(350 / (999.8 / 999.103))).toBeCloseTo(60, 8);

    const choked = sized({ ...ANNEX, flowM3h: 30, recoveryFactor: 0.6, reducers });
    const flp = 0.6 / Math.sqrt(1 + 0.36 * (zetaIn / 0.0016) * (choked.kv / 2500) ** 2);
    const driving = 680 - choked.criticalPressureRatio * 70.1;
    expect(choked.choked).toBe(true);
    expect(0.1 * flp * choked.kv * Math.sqrt(driving / (965.4 / 999.103))).toBeCloseTo(30, 8);
  });

  it('takes a recovery factor of 1', () => expect(sized({ ...ANNEX, recoveryFactor: 1 }).chokedDropKpa).toBeCloseTo(613.81, 2));

  it('a valve of line size has no piping factor', () => {
    const lineSize = sized({ ...COLD, reducers: { valveMm: 25, pipeInMm: 25, pipeOutMm: 25 } });
    expect(lineSize.pipingFactor).toBe(1);
    expect(lineSize.kv).toBe(sized(COLD).kv);
  });

  it('warns of flashing when the outlet is at or below the vapour pressure, and of cavitation from the maker’s ratio on', () => {
    const codes = (input: LiquidSizing) => sized(input).warnings.map((warning) => warning.code);
    expect(codes({ ...ANNEX, outletKpaAbs: 70.1 })).toEqual(['choked', 'flashing']);
    expect(codes({ ...ANNEX, outletKpaAbs: 70.2 })).toEqual(['choked']);
    expect(codes({ ...ANNEX, outletKpaAbs: 60, incipientCavitation: 0.5 })).toEqual(['choked', 'flashing']);
    expect(codes({ ...ANNEX, incipientCavitation: 460 / 609.9 })).toEqual(['cavitation']);
    expect(codes({ ...ANNEX, incipientCavitation: 0.76 })).toEqual([]);
    const messages = sized({ ...ANNEX, outletKpaAbs: 60 }).warnings.map((warning) => warning.message);
    expect(messages[1]).toContain('vapour pressure');
    expect(sized({ ...ANNEX, incipientCavitation: 0.5 }).warnings[0].message).toContain('cavitate');
  });

  it('takes the critical pressure of water unless told another', () => {
    expect(liquidCriticalPressureRatio(70.1)).toBeCloseTo(0.96 - 0.28 * Math.sqrt(70.1 / 22064), 12);
    expect(liquidCriticalPressureRatio(70.1, 22120)).toBeCloseTo(0.94424, 5);
    expect(sized({ ...ANNEX, criticalKpaAbs: undefined }).criticalPressureRatio).toBe(liquidCriticalPressureRatio(70.1));
  });

  it.each<[Partial<LiquidSizing>, string, string]>([
    [{ flowM3h: 0 }, 'not-positive', 'flowM3h'],
    [{ densityKgM3: -1 }, 'not-positive', 'densityKgM3'],
    [{ vapourKpaAbs: NaN }, 'not-positive', 'vapourKpaAbs'],
    [{ inletKpaAbs: Infinity }, 'not-positive', 'inletKpaAbs'],
    [{ criticalKpaAbs: 0 }, 'not-positive', 'criticalKpaAbs'],
    [{ reducers: { ...REDUCERS, pipeOutMm: 0 } }, 'not-positive', 'pipeOutMm'],
    [{ outletKpaAbs: 680 }, 'no-drop', 'outletKpaAbs'],
    [{ outletKpaAbs: NaN }, 'not-positive', 'outletKpaAbs'],
    [{ incipientCavitation: 0 }, 'not-positive', 'incipientCavitation'],
    [{ vapourKpaAbs: 680 }, 'inlet-flashes', 'inletKpaAbs'],
    [{ recoveryFactor: 0 }, 'recovery-factor', 'recoveryFactor'],
    [{ recoveryFactor: 1.01 }, 'recovery-factor', 'recoveryFactor'],
    [{ reducers: { valveMm: 30, pipeInMm: 25, pipeOutMm: 40 } }, 'valve-larger-than-pipe', 'reducers.valveMm'],
    [{ reducers: { valveMm: 30, pipeInMm: 40, pipeOutMm: 25 } }, 'valve-larger-than-pipe', 'reducers.valveMm'],
    [{ reducers: REDUCERS }, 'valve-too-small', 'reducers.valveMm'],
    // The inlet reducer alone takes what choked flow has to drive it (at 60 m³/h), or both take all of a small drop (at 20 m³/h).
    [{ reducers: REDUCERS, flowM3h: 60 }, 'valve-too-small', 'reducers.valveMm'],
    [{ reducers: REDUCERS, flowM3h: 20, outletKpaAbs: 660 }, 'valve-too-small', 'reducers.valveMm'],
  ])('%o is an error: %s', (change, code, path) => {
    const result = sizeLiquidValve({ ...ANNEX, ...change });
    expect(result).toMatchObject({ ok: false, error: { code, path } });
    if (!result.ok) expect(result.error.message.length).toBeGreaterThan(20);
  });

  it('needs a larger valve for more flow, less drop or a lower recovery factor', () => {
    const drop = fc.double({ min: 10, max: 400, noNaN: true });
    fc.assert(
      fc.property(
        fc.double({ min: 0.1, max: 500, noNaN: true }),
        drop,
        fc.double({ min: 0.4, max: 0.9, noNaN: true }),
        (flowM3h, dp, fl) => {
          const input = { ...ANNEX, flowM3h, outletKpaAbs: 680 - dp, recoveryFactor: fl };
          const { kv } = sized(input);
          expect(sized({ ...input, flowM3h: flowM3h * 1.1 }).kv).toBeGreaterThan(kv);
          expect(sized({ ...input, outletKpaAbs: 680 - dp / 1.1 }).kv).toBeGreaterThanOrEqual(kv);
          expect(sized({ ...input, recoveryFactor: fl * 0.9 }).kv).toBeGreaterThanOrEqual(kv);
        },
      ),
    );
  });
});
