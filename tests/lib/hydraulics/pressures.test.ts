import { describe, expect, it } from 'vitest';
import { staticFillPressureKpa, stoppedPressures, surveyPressures } from '@/lib/hydraulics/pressures';
import { waterProperties } from '@/lib/hydraulics/water';

describe('static pressure', () => {
  it('fills to the height of the system plus 30 kPa at the top', () => {
    expect(staticFillPressureKpa(12, 1000)).toBeCloseTo(117.68 + 30, 2);
    expect(staticFillPressureKpa(12, 1000, 50)).toBeCloseTo(167.68, 2);
  });

  it('of a stopped system falls with height from the expansion vessel', () => {
    const nodes = [{ id: 'A' }, { id: 'B', elevationM: 5 }, { id: 'top', elevationM: 20 }];
    const from = (node: string) => stoppedPressures({ nodes, reference: { node, gaugePressureKpa: 150 } }, 1000);
    expect(from('B').map((node) => node.pressureKpa)).toEqual([
      expect.closeTo(150 + 5 * 9.80665, 9),
      150,
      expect.closeTo(150 - 15 * 9.80665, 9),
    ]);
    expect(from('A').map((node) => node.id)).toEqual(['A', 'B', 'top']);
    expect(from('A')[0].pressureKpa).toBe(150);
  });

  it('without a reference is 0 at the first node', () => {
    expect(stoppedPressures({ nodes: [{ id: 'A', elevationM: 3 }, { id: 'B' }] }, 1000)).toEqual([
      { id: 'A', pressureKpa: 0 },
      { id: 'B', pressureKpa: expect.closeTo(29.41995, 9) },
    ]);
  });
});

describe('the pressure survey of a solution', () => {
  const at = (...pressures: number[]) => ({ nodes: pressures.map((pressureKpa, i) => ({ id: `N${i}`, pressureKpa, headM: 0 })) });

  it('finds what boils, draws air, is low or above the rating', () => {
    const survey = surveyPressures(at(-1, -60, 0, 29.9, 30, 601, 600), { vapourKpaAbs: 47.415, ratingKpa: 600 });
    expect(survey.nodes.map((node) => node.concern)).toEqual(['below-atmosphere', 'boils', 'low', 'low', null, 'above-rating', null]);
    expect(survey.lowest).toMatchObject({ id: 'N1', pressureKpa: -60, aboveVapourKpa: expect.closeTo(-6.09, 9) });
    expect(survey.highest).toMatchObject({ id: 'N5', pressureKpa: 601, concern: 'above-rating' });
  });

  it('boils exactly at the vapour pressure, which rises with temperature and matters sooner at altitude', () => {
    const concern = (gauge: number, temperatureC: number, atmosphereKpa?: number) =>
      surveyPressures(at(gauge), { vapourKpaAbs: waterProperties(temperatureC).vapourPressureKpa, atmosphereKpa }).nodes[0].concern;
    expect(concern(waterProperties(110).vapourPressureKpa - 101.325, 110)).toBe('boils');
    expect(concern(40, 82)).toBeNull();
    expect(concern(40, 110)).toBe('boils');
    expect(concern(60, 110)).toBeNull();
    expect(concern(60, 110, 80)).toBe('boils');
  });

  it('does not judge boiling when the vapour pressure is not known', () => {
    expect(surveyPressures(at(-90), { vapourKpaAbs: null }).nodes[0]).toEqual({
      id: 'N0',
      pressureKpa: -90,
      aboveVapourKpa: null,
      concern: 'below-atmosphere',
    });
  });

  it('takes another least pressure, and has no rating unless told', () => {
    expect(surveyPressures(at(45), { vapourKpaAbs: 1, leastGaugeKpa: 50 }).nodes[0].concern).toBe('low');
    expect(surveyPressures(at(1e6), { vapourKpaAbs: 1 }).nodes[0].concern).toBeNull();
  });

  it('names the first of equals, and nothing where there is nothing', () => {
    const survey = surveyPressures(at(100, 100), { vapourKpaAbs: 1 });
    expect([survey.lowest?.id, survey.highest?.id]).toEqual(['N0', 'N0']);
    expect(surveyPressures(at(), { vapourKpaAbs: 1 })).toEqual({ nodes: [], lowest: null, highest: null });
  });
});
