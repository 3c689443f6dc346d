import { AnalysisStatistic, InitHydOption, LinkProperty, Project, Workspace } from 'epanet-js';
import { balancingValveKv } from '@/lib/hydraulics/links/balancing-valve';
import { resistanceOfKv } from '@/lib/hydraulics/links/quadratic';
import { fluidProperties } from '@/lib/hydraulics/fluids';
import { pumpHeadAt } from '@/lib/hydraulics/solve-result';
import type { LinkOf, NetworkDocument, NetworkLink } from '@/lib/hydraulics/types';

/** EPANET's own gravity, ft/s² in metres, which its minor losses are reckoned with. */
const EPANET_GRAVITY = 32.2 * 0.3048;
/** EPANET takes a kinematic viscosity relative to this, m²/s. */
const EPANET_VISCOSITY = 1.1e-5 * 0.3048 ** 2;
const STUB_BORE_MM = 50;
const CURVE_PARTS = 200;

/**
 * A network document as an EPANET 2.2 input file: pipes by Darcy-Weisbach, quadratic links as stubs with a minor loss coefficient, the pump
 * as a curve, the reference node as a reservoir. Only pipe, pump, terminal, balancingValve and resistance links.
 */
export function epanetInput(document: NetworkDocument, accuracy: number): string {
  const found = fluidProperties(document.fluid);
  if (!found.ok) throw new RangeError(found.error.message);
  const fluid = found.properties;
  const reference = document.reference?.node ?? document.nodes[0].id;
  const name = new Map(document.nodes.map((node, k) => [node.id, `n${k}`]));
  const pipes: string[] = [];
  const pumps: string[] = [];
  const curves: string[] = [];
  document.links.forEach((link, k) => {
    const ends = `l${k} ${name.get(link.from)} ${name.get(link.to)}`;
    if (link.kind === 'pump') {
      pumps.push(`${ends} HEAD c${k}`);
      curves.push(...curvePoints(link).map(({ flowLs, headM }) => `c${k} ${flowLs} ${headM}`));
    } else if (link.kind === 'pipe') pipes.push(`${ends} ${link.lengthM} ${link.boreMm} ${link.roughnessMm} ${link.minorK ?? 0} OPEN`);
    else {
      const velocityPerLs = 1e-3 / ((Math.PI / 4) * (STUB_BORE_MM / 1000) ** 2);
      const minorK = (resistance(link) * 2 * EPANET_GRAVITY) / velocityPerLs ** 2;
      pipes.push(`${ends} 0.001 ${STUB_BORE_MM} 0.0001 ${minorK} OPEN`);
    }
  });
  function resistance(link: NetworkLink): number {
    if (link.kind === 'balancingValve') return resistanceOfKv(balancingValveKv(link), fluid);
    if (link.kind === 'resistance' && link.kv !== undefined) return resistanceOfKv(link.kv, fluid);
    if (link.kind !== 'terminal' && link.kind !== 'resistance') throw new RangeError(`no ${link.kind} in EPANET here`);
    return (link.designDropKpa! * 1000) / (fluid.densityKgM3 * 9.80665) / link.designFlowLs! ** 2;
  }
  const viscosity = fluid.viscosityMPaS / 1000 / fluid.densityKgM3 / EPANET_VISCOSITY;
  const junctions = document.nodes.filter((node) => node.id !== reference).map((node) => `${name.get(node.id)} 0 ${-(node.inflowLs ?? 0)}`);
  return [
    '[JUNCTIONS]',
    ...junctions,
    '[RESERVOIRS]',
    `${name.get(reference)} 0`,
    '[PIPES]',
    ...pipes,
    '[PUMPS]',
    ...pumps,
    '[CURVES]',
    ...curves,
    '[OPTIONS]',
    'UNITS LPS',
    'HEADLOSS D-W',
    `VISCOSITY ${viscosity}`,
    `ACCURACY ${accuracy}`,
    'TRIALS 200',
    '[REPORT]',
    'STATUS NO',
    '[END]',
  ].join('\n');
}

/** EPANET joins a curve's points by straight lines: points close enough to be the smooth curve, and on past its end to zero head. */
function curvePoints(link: LinkOf<'pump'>) {
  const step = link.curve[link.curve.length - 1].flowLs / CURVE_PARTS;
  const points = [];
  for (let k = 0; k <= 4 * CURVE_PARTS; k++) {
    const headM = pumpHeadAt(link, k * step, 1);
    if (headM <= 0) break;
    points.push({ flowLs: k * step, headM });
  }
  return points;
}

export interface EpanetRun {
  openMs: number;
  solveMs: number;
  iterations: number;
  /** EPANET's largest head loss error of a link, m. */
  headErrorM: number;
  /** L/s, in the order of the document's links; read after the times were taken. */
  flows: number[];
}

/** One EPANET module for the process. */
export async function epanetWorkspace(): Promise<Workspace> {
  const workspace = new Workspace();
  await workspace.loadModule();
  return workspace;
}

/** Opens, initialises and solves; the iterations alone are `solveMs`, by the clock given. */
export function runEpanet(workspace: Workspace, input: string, linkCount: number, nowMs = () => performance.now()): EpanetRun {
  workspace.writeFile('network.inp', input);
  const project = new Project(workspace);
  const begun = nowMs();
  project.open('network.inp', 'network.rpt', 'network.out');
  project.openH();
  project.initH(InitHydOption.InitFlow);
  const opened = nowMs();
  project.runH();
  const solved = nowMs();
  const flows = Array.from({ length: linkCount }, (_, k) => project.getLinkValue(project.getLinkIndex(`l${k}`), LinkProperty.Flow));
  const iterations = project.getStatistic(AnalysisStatistic.Iterations);
  const headErrorM = project.getStatistic(AnalysisStatistic.MaxHeadError);
  project.closeH();
  project.close();
  return { openMs: opened - begun, solveMs: solved - opened, iterations, headErrorM, flows };
}
