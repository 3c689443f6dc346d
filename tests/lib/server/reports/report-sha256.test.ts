import { expect, it } from 'vitest';
import { canonicalJson, reportSha256, sha256 } from '@/lib/server/reports/report-sha256';
import { entry, reportContent, station } from '../../../make/report';

it('equal values give equal text, in whatever order they were put together', () => {
  expect(canonicalJson({ b: [2, { d: null, c: 'x' }], a: 1, e: undefined })).toBe('{"a":1,"b":[2,{"c":"x","d":null}]}');
  expect(canonicalJson({ e: undefined, a: 1, b: [2, { c: 'x', d: null }] })).toBe('{"a":1,"b":[2,{"c":"x","d":null}]}');
});

it('the order of a list counts', () => {
  expect(canonicalJson([1, 2])).not.toBe(canonicalJson([2, 1]));
});

it('is SHA-256, by the example of FIPS 180-4', () => {
  expect(sha256('abc')).toBe('ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad');
});

it('a report that went through the database has the same SHA-256, and one changed figure gives another', () => {
  const content = reportContent([station('FC-1', { reading: entry('r-1', 'FC-1', 0.19) })], [entry('r-1', 'FC-1', 0.19)]);
  const stored = JSON.parse(JSON.stringify(content));
  expect(reportSha256(stored)).toBe(reportSha256(content));
  stored.stations[1].reading.flowLs = 0.1900001;
  expect(reportSha256(stored)).not.toBe(reportSha256(content));
});
