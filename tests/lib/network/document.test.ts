import { describe, expect, it } from 'vitest';
import { parseNetworkDocument } from '@/lib/network/document';
import { houseExample } from '../../make/house-example';

type Fields = Record<string, unknown>;
const sound = () => JSON.parse(JSON.stringify(houseExample())) as { nodes: Fields[]; links: Fields[] } & Fields;

/** Issues of the sound document after a change, as "path" strings. */
function pathsAfter(change: (document: ReturnType<typeof sound>) => void, purpose: 'solve' | 'balance' | 'size' = 'solve'): string[] {
  const document = sound();
  change(document);
  const parsed = parseNetworkDocument(document, purpose);
  return parsed.ok ? [] : parsed.error.issues.map((issue) => issue.path);
}

const linkFields = (kind: string, fields: Fields) => (document: ReturnType<typeof sound>) => {
  document.links[1] = { id: 'main1', kind, from: 'P', to: 'n1', ...fields };
};

describe('checking a network document', () => {
  it('a sound one is answered as it is', () => {
    const document = sound();
    expect(parseNetworkDocument(document)).toEqual({ ok: true, document });
  });

  it.each([null, 3, 'text', [], undefined])('%j is no document', (value) => {
    expect(parseNetworkDocument(value)).toMatchObject({ ok: false, error: { code: 'not-a-document' } });
  });

  it('another format is named as such', () => {
    expect(parseNetworkDocument({ ...sound(), format: 'network/2' })).toMatchObject({
      error: { code: 'unsupported-format', issues: [{ path: 'format' }] },
    });
  });

  it('an empty network is named as such', () => {
    expect(parseNetworkDocument({ ...sound(), nodes: [], links: [] })).toMatchObject({ error: { code: 'empty-network' } });
  });

  it('more than 50,000 links are refused before they are looked at', () => {
    expect(parseNetworkDocument({ ...sound(), links: new Array(50_001).fill(null) })).toMatchObject({
      error: { code: 'document-too-large' },
    });
  });

  it.each<[string, (document: ReturnType<typeof sound>) => void, string[]]>([
    ['an unknown kind', linkFields('valve', {}), ['links[1].kind']],
    ['no kind', linkFields(undefined as unknown as string, {}), ['links[1].kind']],
    ['a pipe without its quantities', linkFields('pipe', {}), ['links[1].lengthM', 'links[1].boreMm', 'links[1].roughnessMm']],
    ['a bore of zero', linkFields('pipe', { lengthM: 1, boreMm: 0, roughnessMm: 0 }), ['links[1].boreMm']],
    ['a negative length', linkFields('pipe', { lengthM: -1, boreMm: 20, roughnessMm: 0 }), ['links[1].lengthM']],
    ['a length in words', linkFields('pipe', { lengthM: '12', boreMm: 20, roughnessMm: 0 }), ['links[1].lengthM']],
    ['an infinite length', linkFields('pipe', { lengthM: Infinity, boreMm: 20, roughnessMm: 0 }), ['links[1].lengthM']],
    ['a length that is not a number', linkFields('pipe', { lengthM: NaN, boreMm: 20, roughnessMm: 0 }), ['links[1].lengthM']],
    ['a negative local loss', linkFields('pipe', { lengthM: 1, boreMm: 20, roughnessMm: 0, minorK: -1 }), ['links[1].minorK']],
    ['a link to a node that is not there', (d) => (d.links[2].to = 'nowhere'), ['links[2].to']],
    ['a link from a node to itself', (d) => (d.links[2].to = d.links[2].from), ['links[2].to']],
    ['two links of one id', (d) => (d.links[2].id = d.links[1].id), ['links[2].id']],
    ['two nodes of one id', (d) => d.nodes.push({ id: 'X' }), ['nodes[8].id']],
    ['a node without id', (d) => d.nodes.push({}), ['nodes[8].id']],
    [
      'a curve of two points',
      (d) =>
        (d.links[0].curve = [
          { flowLs: 0, headM: 9 },
          { flowLs: 1, headM: 8 },
        ]),
      ['links[0].curve'],
    ],
    ['a curve that rises', (d) => ((d.links[0].curve as Fields[])[5].headM = 50), ['links[0].curve[5].headM']],
    ['a curve out of order', (d) => ((d.links[0].curve as Fields[])[5].flowLs = 0), ['links[0].curve[5].flowLs']],
    ['a negative speed', (d) => (d.links[0].speed = -0.1), ['links[0].speed']],
    ['a valve table out of order', (d) => ((d.links[5].kvTable as Fields[])[1].kv = 0.1), ['links[5].kvTable[1].kv']],
    ['a setting outside its table', (d) => (d.links[5].setting = 4.5), ['links[5].setting']],
    ['an opening above 1', linkFields('controlValve', { kvs: 4, characteristic: 'linear', opening: 1.2 }), ['links[1].opening']],
    ['an unknown characteristic', linkFields('controlValve', { kvs: 4, characteristic: 'cubic' }), ['links[1].characteristic']],
    ['a resistance with nothing', linkFields('resistance', {}), ['links[1].kv']],
    ['a resistance with half a design pair', linkFields('resistance', { designFlowLs: 1 }), ['links[1].designDropKpa']],
    ['a terminal without a design flow', linkFields('terminal', { designDropKpa: 4 }), ['links[1].designFlowLs']],
    [
      'a controller that senses nothing',
      linkFields('dpController', { setpointKpa: 4, kvs: 3, sense: ['X', 'gone'] }),
      ['links[1].sense[1]'],
    ],
    [
      'inflows that do not sum to zero',
      (d) => {
        d.nodes[0].inflowLs = 1;
        d.nodes[1].inflowLs = -0.9;
      },
      ['nodes[0].inflowLs', 'nodes[1].inflowLs'],
    ],
    ['a reference that is not there', (d) => (d.reference = { node: 'gone', gaugePressureKpa: 1 }), ['reference.node']],
    ['a method that is not offered', (d) => (d.options = { method: 'guess' }), ['options.method']],
    ['no fluid', (d) => delete d.fluid, ['fluid']],
    ['an unknown medium', (d) => (d.fluid = { medium: 'oil' }), ['fluid.medium']],
  ])('%s is found at its path', (_, change, paths) => {
    expect(pathsAfter(change)).toEqual(paths);
  });

  it('every fault is listed at once, with the id of its node or link', () => {
    const document = sound();
    document.links[1].designFlowLs = -1;
    document.links[2].to = 'gone';
    document.nodes[1].elevationM = 'high';
    document.fluid = { medium: 'water', temperatureC: 300 };
    const parsed = parseNetworkDocument(document);
    if (parsed.ok) throw new Error('accepted');
    expect(parsed.error.code).toBe('invalid-document');
    expect(parsed.error.issues).toMatchObject([
      { path: 'nodes[1].elevationM', id: 'P' },
      { path: 'links[1].designFlowLs', id: 'main1', message: 'must be greater than 0' },
      { path: 'links[2].to', id: 'main2' },
      { path: 'fluid.temperatureC' },
    ]);
  });

  it.each([
    [{ medium: 'water', temperatureC: 130 }, '0 to 120'],
    [{ medium: 'propylene-glycol', temperatureC: 20, massFraction: 0.7 }, '0 to 0.6'],
    [{ medium: 'ethylene-glycol', temperatureC: -40, massFraction: 0.3 }, 'freezing point'],
  ])('a fluid outside its property data is refused with the range: %j', (fluid, range) => {
    const parsed = parseNetworkDocument({ ...sound(), fluid });
    expect(parsed).toMatchObject({ ok: false, error: { code: 'fluid-out-of-range' } });
    if (!parsed.ok) expect(parsed.error.message).toContain(range);
  });

  it('sizing asks for limits, and for a series instead of a bore', () => {
    const toSize = linkFields('pipe', { lengthM: 4, size: true });
    expect(pathsAfter(toSize, 'size')).toEqual(['links[1].series', 'options.sizing']);
    expect(pathsAfter(toSize, 'solve')).toEqual(['links[1].boreMm', 'links[1].roughnessMm']);
  });

  it('separate networks, parallel links, closed links and no pump are no faults', () => {
    const paths = pathsAfter((document) => {
      document.links.shift();
      document.links.push({ ...document.links[0], id: 'beside' }, { ...document.links[1], id: 'shut', closed: true });
      document.nodes.push({ id: 'u' }, { id: 'v' });
      document.links.push({ id: 'apart', kind: 'checkValve', from: 'u', to: 'v', kv: 2 });
    });
    expect(paths).toEqual([]);
  });
});
