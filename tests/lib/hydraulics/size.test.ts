import { describe, expect, it } from 'vitest';
import { pipeSeries } from '@/lib/hydraulics/pipe-series';
import { size } from '@/lib/hydraulics/size';
import type { NetworkDocument, SizingLimit } from '@/lib/hydraulics/types';
import { parseNetworkDocument } from '@/lib/network/document';
import { distribution } from '../../make/distribution';

const limit: SizingLimit = { maxPaPerM: 300, maxVelocityMs: 1.5 };

function toSize(document: NetworkDocument, sizing: SizingLimit | SizingLimit[]): NetworkDocument {
  const links = document.links.map((link) => {
    if (link.kind !== 'pipe') return link;
    const { boreMm: _, roughnessMm: __, ...rest } = link;
    return { ...rest, size: true, series: 'steel-asme-sch40' };
  });
  const parsed = parseNetworkDocument({ ...document, links, options: { sizing } }, 'size');
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.error));
  return parsed.document;
}

const { sizes } = pipeSeries['steel-asme-sch40'];

describe('size', () => {
  it.each([false, true])('takes the smallest size that keeps both limits (meshed: %s)', (isMeshed) => {
    const result = size(toSize(distribution(60, isMeshed), limit));
    expect(result.converged).toBe(true);
    expect(result.pipes.length).toBeGreaterThan(100);
    for (const pipe of result.pipes) {
      expect(pipe.paPerM).toBeLessThanOrEqual(limit.maxPaPerM);
      expect(pipe.velocityMs).toBeLessThanOrEqual(limit.maxVelocityMs);
      const smaller = sizes[sizes.findIndex((each) => each.boreMm === pipe.boreMm) - 1];
      if (!smaller) continue;
      // Friction goes with the bore to about the power -5, velocity to -2.
      const ratio = pipe.boreMm / smaller.boreMm;
      expect(pipe.velocityMs * ratio ** 2 > limit.maxVelocityMs || pipe.paPerM * ratio ** 5.4 > limit.maxPaPerM).toBe(true);
    }
    const bores = new Map(result.pipes.map((pipe) => [pipe.id, pipe.boreMm]));
    for (const link of result.document.links) if (link.kind === 'pipe') expect(link.boreMm).toBe(bores.get(link.id));
  });

  it('uses the limit of the range that a bore falls in', () => {
    const ranges = [
      { upToBoreMm: 30, maxPaPerM: 120, maxVelocityMs: 0.6 },
      { upToBoreMm: 1000, maxPaPerM: 300, maxVelocityMs: 2 },
    ];
    const result = size(toSize(distribution(60), ranges));
    for (const pipe of result.pipes) {
      const { maxPaPerM, maxVelocityMs } = pipe.boreMm <= 30 ? ranges[0] : ranges[1];
      expect(pipe.paPerM).toBeLessThanOrEqual(maxPaPerM);
      expect(pipe.velocityMs).toBeLessThanOrEqual(maxVelocityMs);
    }
  });

  it('gives the largest size with a warning where none keeps the limits', () => {
    const result = size(toSize(distribution(25), { maxPaPerM: 0.01, maxVelocityMs: 0.01 }));
    expect(result.pipes[0].boreMm).toBe(sizes[sizes.length - 1].boreMm);
    expect(result.warnings[0]).toMatchObject({ code: 'no-size' });
  });
});
