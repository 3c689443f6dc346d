import { describe, expect, it } from 'vitest';
import { loopHierarchy } from '@/lib/balancing/hierarchy';
import { visitAsPredicted } from '../../bench/predicted-visit';
import { visitProportionally } from '../../bench/proportional-visit';
import { visitBuilding } from '../../bench/visits';
import { designBuilding } from '../../site/building';
import { SeededRandom } from '../../site/seeded-random';
import { statedSite, VirtualSite } from '../../site/virtual-site';

const siteOf = (seed: number, model = statedSite) => {
  const random = new SeededRandom(seed);
  const document = designBuilding(12, random);
  return { document, site: new VirtualSite(document, random, model) };
};

describe('the virtual building', () => {
  it('is the same building with the same readings for the same seed, and another for another', () => {
    const [a, b, c] = [siteOf(1), siteOf(1), siteOf(2)];
    expect(a.document).toEqual(b.document);
    expect(a.site.read('V0.0.0')).toEqual(b.site.read('V0.0.0'));
    expect(c.site.read('V0.0.0').value).not.toBe(a.site.read('V0.0.0').value);
  });

  it('sets a valve to a tenth of a turn and stays within its table', () => {
    const { site } = siteOf(1);
    expect(site.set('V0.0.0', 2.3417)).toBe(2.3);
    expect(site.set('V0.0.0', 99)).toBe(4);
  });

  it('has errors of the stated size', () => {
    const { site } = siteOf(3, { ...statedSite, hasFaults: false });
    const flows = Array.from({ length: 400 }, () => Math.sqrt(Math.max(site.read('V0.0.0').value, 0)));
    const mean = flows.reduce((sum, flow) => sum + flow, 0) / flows.length;
    const spread = Math.sqrt(flows.reduce((sum, flow) => sum + (flow / mean - 1) ** 2, 0) / flows.length);
    expect(spread).toBeGreaterThan(0.013);
    expect(spread).toBeLessThan(0.03);
  });

  it('has its terminals in branches below one main valve', () => {
    const { top, valveOf, stations } = loopHierarchy(siteOf(1).document);
    expect(top?.link).toBe('PU');
    expect(top?.members.map((member) => member.link)).toEqual(['main']);
    expect(
      stations
        .get('main')
        ?.members.map((member) => member.link)
        .sort(),
    ).toEqual(['floor0.0', 'floor0.1']);
    expect(stations.get('floor0.0')?.terminals).toHaveLength(6);
    expect(valveOf.size).toBe(12);
  });
});

describe('a visit to it', () => {
  it('as predicted touches each valve about once and leaves the terminals within tolerance, where the procedure takes more of both', () => {
    const predicted = visitBuilding('predicted', visitAsPredicted, 12, 1);
    const proportional = visitBuilding('proportional', visitProportionally, 12, 1);
    expect(predicted.changesPerValve).toBeLessThan(1.06);
    expect(predicted.readingsPerTerminal).toBeLessThan(2.3);
    expect(predicted.within5).toBeGreaterThanOrEqual(98);
    expect(predicted.within5).toBeGreaterThanOrEqual(proportional.within5);
    expect(proportional.readingsPerTerminal).toBeGreaterThan(predicted.readingsPerTerminal);
  });

  it('finds the faults of this building and names no sound place', () => {
    const predicted = visitBuilding('predicted', visitAsPredicted, 12, 2);
    expect(predicted.faultsFound).toBe(100);
    expect(predicted.falseAlarms).toBe(0);
  });
});
