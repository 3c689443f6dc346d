import { expect, it } from 'vitest';
import { pumpsOf, stripOfReport, summaryOf, valvesOf, verdictOf } from '@/lib/api/report-judgement';
import { entry, reportContent, station } from '../../make/report';

const measured = (tag: string, flowLs: number) => station(tag, { reading: entry(`r-${tag}`, tag, flowLs) });
const content = reportContent([measured('FC-1', 0.19), measured('FC-2', 0.15), measured('FC-3', 0.24), station('FC-4')], []);

it('judges by the bands that the report states, even where they changed after the reading', () => {
  const wide = { ...content, tolerances: content.tolerances.map((rule) => ({ ...rule, lowerPercent: -30, upperPercent: 30 })) };
  const verdicts = (of: typeof content) => of.stations.filter(({ kind }) => kind === 'terminal').map((it) => verdictOf(of, it));
  expect(verdicts(content)).toEqual(['within', 'low', 'high', null]);
  expect(verdicts(wide)).toEqual(['within', 'within', 'within', null]);
});

it('keeps the verdict of the day where the report states no band for it', () => {
  const [, first] = content.stations;
  const low = { ...first, reading: { ...first.reading!, verdict: 'low' as const } };
  expect(verdictOf({ ...content, tolerances: [] }, low)).toBe('low');
});

it('counts the terminals, names those not measured and the one furthest from design; the pump is none of them', () => {
  const { notMeasured, worst, ...counts } = summaryOf(content);
  expect(counts).toEqual({ terminals: 4, within: 1, low: 1, high: 1 });
  expect(notMeasured.map(({ tag }) => tag)).toEqual(['FC-4']);
  expect(worst?.tag).toBe('FC-2');
});

it('before anything is measured there is no worst terminal', () => {
  expect(summaryOf(reportContent([station('FC-1')], [])).worst).toBeNull();
});

it('the strip has one mark a terminal in walking order and the terminals’ band', () => {
  const { strip, band } = stripOfReport(content);
  expect(strip.map(({ tag, verdict }) => [tag, verdict])).toEqual([
    ['FC-1', 'within'],
    ['FC-2', 'low'],
    ['FC-3', 'high'],
    ['FC-4', null],
  ]);
  expect(band).toEqual({ lowerPercent: 90, upperPercent: 110 });
});

it('finds the valve at each station and the duty of each pump', () => {
  expect(valvesOf(content).map(({ station: { tag }, valve }) => [tag, valve.id])).toContainEqual(['FC-3', 'FC-3:balancing']);
  expect(valvesOf(content)).toHaveLength(4);
  expect(pumpsOf(content).map(({ station: { tag }, duty }) => [tag, duty.requiredHeadM])).toEqual([['P-1', 7.25]]);
});
