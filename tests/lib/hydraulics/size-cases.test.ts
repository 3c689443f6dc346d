import { describe, expect, it } from 'vitest';
import { frictionFactor } from '@/lib/hydraulics/friction';
import { pipeSeries } from '@/lib/hydraulics/pipe-series';
import { size } from '@/lib/hydraulics/size';
import type { NetworkLink, SizingLimit } from '@/lib/hydraulics/types';
import { networkOfLinks, pump, terminal } from '../../make/network-of-links';

const { sizes } = pipeSeries['steel-asme-sch40'];
const pipe = (id: string, from: string, to: string, rest: object = {}): NetworkLink => ({
  id,
  kind: 'pipe',
  from,
  to,
  lengthM: 10,
  boreMm: 1,
  roughnessMm: 0.045,
  size: true,
  series: 'steel-asme-sch40',
  ...rest,
});

/** Friction (Pa/m) and velocity (m/s) of 1 mm²/s water of 1000 kg/m³, written out. */
function lossOf(flowLs: number, boreMm: number) {
  const velocity = flowLs / 1000 / ((Math.PI / 4) * (boreMm / 1000) ** 2);
  const factor = frictionFactor((velocity * boreMm) / 1000 / 1e-6, 0.045 / boreMm);
  return { paPerM: (factor * 1000 * velocity ** 2) / 2 / (boreMm / 1000), velocityMs: velocity };
}

const loop = (sizing?: SizingLimit | SizingLimit[], flowLs = 0.4, links: NetworkLink[] = [pipe('P', 'a', 'b')]) =>
  size(networkOfLinks([pump('PU', 'A', 'a', 60, 5), ...links, terminal('T', 'b', 'A', flowLs, 20)], {}, { options: { sizing } }));

describe('a pipe to be sized', () => {
  it('has the friction and velocity of its design flow, without local losses', () => {
    const { converged, warnings, pipes } = loop({ maxPaPerM: 300, maxVelocityMs: 1.5 }, 0.4, [pipe('P', 'a', 'b', { minorK: 50 })]);
    expect(converged).toBe(true);
    expect(warnings).toEqual([]);
    const chosen = sizes.find(({ boreMm }) => lossOf(0.4, boreMm).paPerM <= 300)!;
    const { paPerM, velocityMs } = lossOf(0.4, chosen.boreMm);
    expect(pipes).toEqual([
      {
        id: 'P',
        flowLs: expect.closeTo(0.4, 9),
        nominal: chosen.nominal,
        boreMm: chosen.boreMm,
        paPerM: expect.closeTo(paPerM, 6),
        velocityMs: expect.closeTo(velocityMs, 9),
      },
    ]);
  });

  it('drawn against its flow gets the same size', () => {
    const [back] = loop({ maxPaPerM: 300, maxVelocityMs: 1.5 }, 0.4, [pipe('P', 'b', 'a')]).pipes;
    const [along] = loop({ maxPaPerM: 300, maxVelocityMs: 1.5 }).pipes;
    expect(back).toMatchObject({ boreMm: along.boreMm, paPerM: along.paPerM, velocityMs: along.velocityMs });
    expect(back.flowLs).toBeCloseTo(-0.4, 9);
  });

  it('may stand exactly at a limit', () => {
    const { boreMm } = sizes[3];
    const { paPerM, velocityMs } = lossOf(0.4, boreMm);
    expect(loop({ maxPaPerM: paPerM * (1 + 1e-9), maxVelocityMs: 9 }).pipes[0].boreMm).toBe(boreMm);
    expect(loop({ maxPaPerM: paPerM * (1 - 1e-6), maxVelocityMs: 9 }).pipes[0].boreMm).toBe(sizes[4].boreMm);
    expect(loop({ maxPaPerM: 9e9, maxVelocityMs: velocityMs * (1 + 1e-9) }).pipes[0].boreMm).toBe(boreMm);
    expect(loop({ maxPaPerM: 9e9, maxVelocityMs: velocityMs * (1 - 1e-6) }).pipes[0].boreMm).toBe(sizes[4].boreMm);
  });

  it('without a limit, or without flow, gets the smallest size', () => {
    expect(loop().pipes[0].boreMm).toBe(sizes[0].boreMm);
    const dead = loop({ maxPaPerM: 300, maxVelocityMs: 1.5 }, 0.4, [
      pipe('P', 'a', 'b'),
      pipe('dead end', 'b', 'nowhere'),
      pipe('shut', 'a', 'b', { closed: true }),
    ]);
    const ofId = (id: string) => dead.pipes.find((each) => each.id === id);
    expect(ofId('dead end')).toMatchObject({ boreMm: sizes[0].boreMm, paPerM: 0, velocityMs: 0, flowLs: expect.closeTo(0, 12) });
    expect(ofId('shut')).toMatchObject({ boreMm: sizes[0].boreMm, flowLs: 0 });
  });

  it('is one that asks for it and has a series: others keep their bore', () => {
    const links = [
      pipe('P', 'a', 'm'),
      pipe('own', 'm', 'n', { size: false, boreMm: 55 }),
      pipe('no series', 'n', 'b', { series: undefined, boreMm: 44 }),
    ];
    const { pipes, document } = loop({ maxPaPerM: 300, maxVelocityMs: 1.5 }, 0.4, links);
    expect(pipes.map(({ id }) => id)).toEqual(['P']);
    const bore = (id: string) => (document.links.find((each) => each.id === id) as { boreMm: number }).boreMm;
    expect([bore('P'), bore('own'), bore('no series')]).toEqual([pipes[0].boreMm, 55, 44]);
  });
});

describe('limits by bore', () => {
  const ranges: SizingLimit[] = [
    { upToBoreMm: sizes[2].boreMm, maxPaPerM: 100, maxVelocityMs: 0.5 },
    { upToBoreMm: sizes[4].boreMm, maxPaPerM: 200, maxVelocityMs: 1 },
  ];
  const within = (flowLs: number, boreMm: number, { maxPaPerM, maxVelocityMs }: SizingLimit) =>
    lossOf(flowLs, boreMm).paPerM <= maxPaPerM && lossOf(flowLs, boreMm).velocityMs <= maxVelocityMs;

  it('hold up to and with the bore they name, the last one for all beyond', () => {
    for (const flowLs of [0.05, 0.1, 0.2, 0.3, 0.5, 0.8, 1.2, 2, 4, 9]) {
      const chosen = sizes.find(({ boreMm }) => within(flowLs, boreMm, boreMm <= sizes[2].boreMm ? ranges[0] : ranges[1]))!;
      expect(loop(ranges, flowLs).pipes[0].boreMm, `${flowLs} L/s`).toBe(chosen.boreMm);
    }
  });

  it('that have no end hold for all bores', () => {
    const open: SizingLimit[] = [
      { maxPaPerM: 100, maxVelocityMs: 0.5 },
      { upToBoreMm: 30, maxPaPerM: 9e9, maxVelocityMs: 99 },
    ];
    const chosen = sizes.find(({ boreMm }) => within(0.4, boreMm, open[0]))!;
    expect(loop(open).pipes[0].boreMm).toBe(chosen.boreMm);
  });
});

describe('sizes that cannot be found', () => {
  it('leave the largest of the series, and each such pipe is named', () => {
    const { converged, pipes, warnings } = loop({ maxPaPerM: 1e-6, maxVelocityMs: 1e-6 });
    expect(converged).toBe(true);
    expect(pipes[0].boreMm).toBe(sizes[sizes.length - 1].boreMm);
    expect(warnings).toEqual([
      { code: 'no-size', id: 'P', message: 'No size of its series keeps P within the limits; it has the largest.' },
    ]);
  });

  it('for design flows that do not add up, name where', () => {
    const document = networkOfLinks([
      pump('PU', 'A', 'a', 60, 5),
      pipe('P', 'a', 'b'),
      terminal('T1', 'b', 'c', 0.4, 20),
      terminal('T2', 'c', 'A', 0.3, 20),
    ]);
    const { converged, pipes, warnings } = size(document);
    expect(converged).toBe(false);
    expect(pipes).toEqual([]);
    expect(warnings).toEqual([
      { code: 'design-flow-conflict', message: expect.stringMatching(/^The design flows do not add up at .*c.*\.$/) },
    ]);
  });
});

describe('pipes in a ring', () => {
  it('settle on bores that keep the limits at the flows that these bores make', () => {
    const links = [pipe('near', 'a', 'm'), pipe('far', 'a', 'n', { lengthM: 60 }), pipe('tie', 'm', 'n', { lengthM: 25 })];
    const limit = { maxPaPerM: 250, maxVelocityMs: 1.2 };
    const all = [pump('PU', 'A', 'a', 60, 5), ...links, terminal('T1', 'm', 'A', 0.5, 20), terminal('T2', 'n', 'A', 0.9, 20)];
    const result = size(networkOfLinks(all, {}, { options: { sizing: limit } }));
    expect(result.converged).toBe(true);
    const flow = (id: string) => result.pipes.find((each) => each.id === id)!.flowLs;
    expect(flow('near') - flow('tie')).toBeCloseTo(0.5, 6);
    expect(flow('far') + flow('tie')).toBeCloseTo(0.9, 6);
    for (const each of result.pipes) {
      const smallest = sizes.find(({ boreMm }) => within(Math.abs(each.flowLs), boreMm))!;
      expect(each.boreMm).toBe(smallest.boreMm);
    }
    // Head from a to n is the same both ways.
    const drop = (id: string) => {
      const { flowLs, boreMm } = result.pipes.find((each) => each.id === id)!;
      const { lengthM } = links.find((each) => each.id === id) as { lengthM: number };
      return Math.sign(flowLs) * lossOf(Math.abs(flowLs), boreMm).paPerM * lengthM;
    };
    expect(drop('near') + drop('tie')).toBeCloseTo(drop('far'), 0);
    function within(flowLs: number, boreMm: number) {
      const { paPerM, velocityMs } = lossOf(flowLs, boreMm);
      return paPerM <= limit.maxPaPerM && velocityMs <= limit.maxVelocityMs;
    }
  });
});
