import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseNetworkDocument } from '@/lib/network/document';
import { networkOfLinks, resistance } from '../../make/network-of-links';

const parsed = (curve: { flowLs: number; headM: number }[]) =>
  parseNetworkDocument(networkOfLinks([{ id: 'PU', kind: 'pump', from: 'A', to: 'B', curve }, resistance('load', 'B', 'A', 20)]));

const steps = fc.array(fc.tuple(fc.double({ min: 0.01, max: 2, noNaN: true }), fc.double({ min: 0, max: 3, noNaN: true })), {
  minLength: 2,
  maxLength: 9,
});

/** Points from 0 L/s at 40 m, falling or level. */
function curveOf(falls: [number, number][]) {
  const curve = [{ flowLs: 0, headM: 40 }];
  for (const [further, fall] of falls) {
    const { flowLs, headM } = curve[curve.length - 1];
    curve.push({ flowLs: flowLs + further, headM: headM - fall });
  }
  return curve;
}

describe('a pump curve in a document', () => {
  it('is taken when its head falls or stays level', () => {
    fc.assert(
      fc.property(steps, (falls) => {
        expect(parsed(curveOf(falls)).ok).toBe(true);
      }),
    );
  });

  it('is refused, with the point named, when its head rises anywhere', () => {
    fc.assert(
      fc.property(steps, fc.nat(), fc.double({ min: 1e-6, max: 5, noNaN: true }), (falls, pick, rise) => {
        const curve = curveOf(falls);
        const at = 1 + (pick % (curve.length - 1));
        curve[at].headM = curve[at - 1].headM + rise;
        const result = parsed(curve);
        if (result.ok) throw new Error('taken');
        expect(result.error.issues).toContainEqual({ path: `links[0].curve[${at}].headM`, id: 'PU', message: 'must not rise with flow' });
      }),
    );
  });

  // R. W. Jeppson, Steady Flow Analysis of Pipe Networks, 1974: 155.286 + 16.707 Q - 2.505 Q² ft rises up to 3.335 cfs.
  it('of a published example that rises at first is refused', () => {
    const curve = [0, 1, 2, 3, 4, 5].map((flow) => ({
      flowLs: flow * 28.316846592,
      headM: (155.286 + 16.707 * flow - 2.505 * flow ** 2) * 0.3048,
    }));
    const result = parsed(curve);
    if (result.ok) throw new Error('taken');
    expect(result.error.issues.map(({ path }) => path)).toEqual([1, 2, 3].map((k) => `links[0].curve[${k}].headM`));
  });
});
