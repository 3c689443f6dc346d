'use client';

import { Deviation } from '@/components/ui/deviation';
import { inherentRatio } from '@/lib/hydraulics/control-valve';
import type { Equipment } from '@/lib/network/drawing';
import type { PieceSolution } from '@/lib/network/drawing-figures';
import { authorityWorking, designPairWorking, pumpWorking, valveWorking, type Working } from '@/lib/network/working';
import { verdictOf } from '../deviation-mark';
import { useEditor, useResults } from '../editor-context';
import { FigureRow, Section } from './rows';
import { WorkingList } from './working-list';

/** What the solver found for one piece, and how. */
export function PieceResults({ piece }: { piece: Equipment }) {
  const { figures, isOld } = useResults();
  const { band } = useEditor();
  const solution = figures?.pieces.get(piece.id);
  if (!figures || !solution) return null;
  const { valve } = solution;
  return (
    <>
      {valve && (
        <Section title="Balanced">
          <FigureRow label="Setting">
            <span className="figures text-brass font-bold">{valve.setting.toFixed(2)}</span>{' '}
            <span className="text-quiet text-xs">turns</span>
          </FigureRow>
          <FigureRow label="At that setting" quantity="valveCoefficient" si={valve.kv} />
          <FigureRow label="Drop at design" quantity="pressure" si={valve.dropKpa} />
          <FigureRow label="State">{valve.state.replace('-', ' ')}</FigureRow>
        </Section>
      )}
      <Section title={`${figures.basis === 'drawn' ? 'Valves as drawn' : 'As balanced'}${isOld ? ' (earlier figures)' : ''}`}>
        {solution.flowLs !== null && <FigureRow label="Flow" quantity="flow" si={solution.flowLs} />}
        {solution.percentOfDesign !== null && (
          <FigureRow label="Of design">
            <Deviation percent={solution.percentOfDesign} verdict={verdictOf(solution.percentOfDesign, band)} />{' '}
            <span className="text-quiet text-xs">%</span>
          </FigureRow>
        )}
        {solution.pump && (
          <>
            <FigureRow label="Head" quantity="head" si={solution.pump.headM} />
            {solution.pump.shaftKw !== null && <FigureRow label="Shaft power" quantity="power" si={solution.pump.shaftKw} />}
            {solution.pump.requiredHeadM !== null && (
              <FigureRow label="Head needed for design" quantity="head" si={solution.pump.requiredHeadM} />
            )}
            {solution.pump.requiredSpeed !== null && (
              <FigureRow label="Speed for design">
                <span className="figures">{(solution.pump.requiredSpeed * 100).toFixed(1)}</span>{' '}
                <span className="text-quiet text-xs">%</span>
              </FigureRow>
            )}
          </>
        )}
        {solution.dropKpa !== null && !solution.pump && <FigureRow label="Drop" quantity="pressure" si={Math.abs(solution.dropKpa)} />}
        {solution.inletKpa !== null && (
          <FigureRow
            label={solution.outletKpa === null ? 'Gauge pressure' : 'Gauge pressure in'}
            quantity="pressure"
            si={solution.inletKpa}
          />
        )}
        {solution.outletKpa !== null && <FigureRow label="Gauge pressure out" quantity="pressure" si={solution.outletKpa} />}
        {solution.authority !== null && (
          <FigureRow label="Authority of the control valve">
            <span className="figures">{solution.authority.toFixed(2)}</span>
          </FigureRow>
        )}
        {solution.circuitDropKpa !== null && <FigureRow label="Circuit drop at design" quantity="pressure" si={solution.circuitDropKpa} />}
      </Section>
      <WorkingList workings={workingsOf(piece, solution, figures.fluid.densityKgM3)} />
    </>
  );
}

function workingsOf(piece: Equipment, { flowLs, valve, parts, pump, authority }: PieceSolution, densityKgM3: number): Working[] {
  if (flowLs === null) return [];
  const balancing = valve
    ? [valveWorking('Balancing valve, drop at its balanced setting and design flow', valve.kv, valve.flowLs, densityKgM3)]
    : [];
  switch (piece.kind) {
    case 'terminalUnit': {
      const { controlValve, designFlowLs, coilDropKpa, strainerKv } = piece;
      const controlKv = controlValve?.kvs ? controlValve.kvs * inherentRatio(controlValve.characteristic, controlValve.opening) : 0;
      return [
        ...(designFlowLs && coilDropKpa ? [designPairWorking('Coil, drop', { designFlowLs, designDropKpa: coilDropKpa }, flowLs)] : []),
        ...(controlKv && parts.control ? [valveWorking('Control valve, drop', controlKv, flowLs, densityKgM3)] : []),
        ...(strainerKv && parts.strainer ? [valveWorking('Strainer, drop', strainerKv, flowLs, densityKgM3)] : []),
        ...balancing,
        ...(authority !== null && controlValve?.kvs && designFlowLs
          ? [authorityWorking(controlValve.kvs, designFlowLs, densityKgM3, authority)]
          : []),
      ];
    }
    case 'balancingValve':
      return balancing;
    case 'controlValve': {
      const kv = piece.kvs ? piece.kvs * inherentRatio(piece.characteristic, piece.opening) : 0;
      return kv ? [valveWorking('Drop', kv, flowLs, densityKgM3)] : [];
    }
    case 'source':
      return piece.designFlowLs && piece.designDropKpa
        ? [designPairWorking('Drop', { designFlowLs: piece.designFlowLs, designDropKpa: piece.designDropKpa }, flowLs)]
        : [];
    case 'pump':
      return pump ? [pumpWorking(flowLs, pump.headM, densityKgM3)] : [];
    case 'checkValve':
    case 'isolatingValve':
    case 'strainer':
      return piece.kv ? [valveWorking('Drop', piece.kv, flowLs, densityKgM3)] : [];
    case 'flowStation': {
      const kv = piece.lossKv ?? piece.signalKv;
      return kv ? [valveWorking('Drop', kv, flowLs, densityKgM3)] : [];
    }
    // A controller stands where its set point asks for, a limiter's drop is what is left to it: neither is a formula of the flow.
    case 'dpController':
    case 'flowLimiter':
    case 'decoupler':
    case 'tee':
    case 'header':
    case 'pressureStation':
    case 'expansionVessel':
      return [];
  }
}
