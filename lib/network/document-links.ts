import { linkKinds } from '@/lib/hydraulics/links/link-laws';
import { pipeSeries } from '@/lib/hydraulics/pipe-series';
import type { LinkKind } from '@/lib/hydraulics/types';
import type { FieldCheck } from './document-fault';

const characteristics = ['linear', 'equalPercentage', 'quickOpening'];

/** Checks one link: its ends, its kind, and what the law of that kind needs. */
export function checkLink(at: FieldCheck, nodeIds: Set<string>, isForSizing: boolean): void {
  const { from, to, kind } = at.fields;
  const ends = [at.node('from', nodeIds), at.node('to', nodeIds)];
  if (ends.every(Boolean) && from === to) at.bad('to', 'must be another node than from');
  at.flag('closed');
  if (!at.oneOf('kind', linkKinds, true)) return;
  checks[kind as LinkKind](at, nodeIds, isForSizing);
}

const checks: Record<LinkKind, (at: FieldCheck, nodeIds: Set<string>, isForSizing: boolean) => void> = {
  pipe(at, _, isForSizing) {
    at.positive('lengthM');
    at.flag('size');
    const isToBeSized = isForSizing && at.fields.size === true;
    const needsSeries = isToBeSized;
    if (needsSeries || at.fields.series !== undefined) at.oneOf('series', Object.keys(pipeSeries), needsSeries);
    const bore = at.positive('boreMm', !isToBeSized);
    const roughness = at.notNegative('roughnessMm', !isToBeSized);
    const { boreMm, roughnessMm } = at.fields;
    // Colebrook-White was fitted up to a relative roughness of 0.05; at 0.1 the wall is no longer a pipe's.
    if (bore && roughness && (roughnessMm as number) > 0.1 * (boreMm as number)) at.bad('roughnessMm', 'must be at most a tenth of boreMm');
    at.notNegative('minorK');
  },
  pump(at) {
    const points = at.points('curve', 'flowLs', 'headM', 3);
    if (points && at.rising('curve', 'flowLs', points)) {
      for (let k = 1; k < points.length; k++) if (points[k].y > points[k - 1].y) at.bad(`curve[${k}].headM`, 'must not rise with flow');
    }
    at.between('speed', 0, 10);
    at.flag('nonReturn');
    const efficiency = at.points('efficiency', 'flowLs', 'fraction', 1, false);
    if (efficiency && at.rising('efficiency', 'flowLs', efficiency))
      efficiency.forEach(({ y }, k) => {
        if (y > 1) at.bad(`efficiency[${k}].fraction`, 'must be from 0 to 1');
      });
  },
  terminal(at) {
    at.positive('designFlowLs');
    at.positive('designDropKpa');
    if (at.positive('exponent', false)) at.between('exponent', 0.5, 4);
    at.number('loadKw');
  },
  controlValve(at) {
    at.positive('kvs');
    at.oneOf('characteristic', characteristics);
    if (at.number('rangeability') && (at.fields.rangeability as number) <= 1) at.bad('rangeability', 'must be greater than 1');
    at.between('opening', 0, 1);
  },
  balancingValve(at) {
    const table = at.points('kvTable', 'setting', 'kv', 2);
    const rises = table && at.rising('kvTable', 'setting', table);
    const kvRises =
      table &&
      at.rising(
        'kvTable',
        'kv',
        table.map(({ y }) => ({ x: y })),
      );
    if (rises && kvRises) at.between('setting', table[0].x, table[table.length - 1].x);
    else at.number('setting');
    at.flag('locked');
    at.positive('settingStep', false);
  },
  resistance(at) {
    const { kv, designFlowLs, designDropKpa } = at.fields;
    if (kv === undefined && designFlowLs === undefined && designDropKpa === undefined)
      at.bad('kv', 'is required, or designFlowLs with designDropKpa');
    else if (kv !== undefined) at.positive('kv');
    if (designFlowLs !== undefined || designDropKpa !== undefined) {
      at.positive('designFlowLs', kv === undefined);
      at.positive('designDropKpa', kv === undefined);
    }
  },
  checkValve(at) {
    at.positive('kv');
  },
  flowLimiter(at) {
    at.positive('limitLs');
    at.positive('minDropKpa');
  },
  dpController(at, nodeIds) {
    at.positive('setpointKpa');
    at.positive('kvs');
    const { sense } = at.fields;
    if (!Array.isArray(sense) || sense.length !== 2) at.bad('sense', 'must be two nodes, high and low');
    else {
      sense.forEach((node: unknown, k) => {
        if (typeof node !== 'string' || !nodeIds.has(node)) at.bad(`sense[${k}]`, 'names no node');
      });
      if (sense[0] === sense[1]) at.bad('sense[1]', 'must be another node than the high one');
    }
  },
};
