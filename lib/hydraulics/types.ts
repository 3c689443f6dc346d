import type { Characteristic } from './control-valve';
import type { FluidSpecification } from './fluids';
import type { PipeSeriesId } from './pipe-series';

/**
 * The network document ("network/1") and its results. All quantities are SI in the unit that the name ends with; flow is
 * positive from `from` to `to`. The field names are a public interface: they are added to, never renamed.
 */
export interface NetworkDocument {
  format: 'network/1';
  name?: string;
  fluid: Fluid;
  /** Fixes the gauge pressure at one node, where the expansion vessel connects; without it the first node has 0 kPa. */
  reference?: { node: string; gaugePressureKpa: number };
  nodes: NetworkNode[];
  links: NetworkLink[];
  options?: NetworkOptions;
}

export type Fluid = FluidSpecification;

/** `inflowLs` is a fixed flow from outside into the network; it sums to zero over each connected part. */
export interface NetworkNode {
  id: string;
  elevationM?: number;
  inflowLs?: number;
}

export type Method = 'hardy-cross' | 'simultaneous';

export interface NetworkOptions {
  method?: Method;
  /** Keep every correction of the Hardy Cross iteration in the result, for a reviewer to follow. */
  history?: boolean;
  pumpExcess?: 'speed' | 'throttle';
  sizing?: SizingLimit | SizingLimit[];
}

export interface SizingLimit {
  upToBoreMm?: number;
  maxPaPerM: number;
  maxVelocityMs: number;
}

interface LinkEnds {
  id: string;
  from: string;
  to: string;
  closed?: boolean;
}

export interface PipeLink extends LinkEnds {
  kind: 'pipe';
  lengthM: number;
  boreMm: number;
  roughnessMm: number;
  minorK?: number;
  size?: boolean;
  series?: PipeSeriesId;
}

export interface PumpLink extends LinkEnds {
  kind: 'pump';
  curve: { flowLs: number; headM: number }[];
  speed?: number;
  efficiency?: { flowLs: number; fraction: number }[];
  nonReturn?: boolean;
}

export interface TerminalLink extends LinkEnds {
  kind: 'terminal';
  designFlowLs: number;
  designDropKpa: number;
  exponent?: number;
  loadKw?: number;
}

export interface ControlValveLink extends LinkEnds {
  kind: 'controlValve';
  kvs: number;
  characteristic?: Characteristic;
  rangeability?: number;
  opening?: number;
}

export interface BalancingValveLink extends LinkEnds {
  kind: 'balancingValve';
  kvTable: { setting: number; kv: number }[];
  setting?: number;
  locked?: boolean;
  /** Smallest step of the valve's own scale; settings found by `balance` are rounded to it. */
  settingStep?: number;
}

/** Either `kv` or the design pair; a `kv` wins. */
export interface ResistanceLink extends LinkEnds {
  kind: 'resistance';
  kv?: number;
  designFlowLs?: number;
  designDropKpa?: number;
}

export interface CheckValveLink extends LinkEnds {
  kind: 'checkValve';
  kv: number;
}

export interface FlowLimiterLink extends LinkEnds {
  kind: 'flowLimiter';
  limitLs: number;
  minDropKpa: number;
}

export interface DpControllerLink extends LinkEnds {
  kind: 'dpController';
  setpointKpa: number;
  /** High node, low node. */
  sense: [string, string];
  kvs: number;
}

export type NetworkLink =
  | PipeLink
  | PumpLink
  | TerminalLink
  | ControlValveLink
  | BalancingValveLink
  | ResistanceLink
  | CheckValveLink
  | FlowLimiterLink
  | DpControllerLink;

export type LinkKind = NetworkLink['kind'];
export type LinkOf<K extends LinkKind> = Extract<NetworkLink, { kind: K }>;

export interface Warning {
  code: WarningCode;
  id?: string;
  message: string;
}

export type WarningCode =
  | 'pump-past-curve'
  | 'pump-too-small'
  | 'no-pump'
  | 'cut-off'
  | 'no-reference'
  | 'transition-flow'
  | 'forced-flow'
  | 'controller-open'
  | 'controller-shut'
  | 'limiter-starved'
  | 'not-converged'
  | 'hardy-cross-slow'
  | 'circuit-closed'
  | 'design-flow-conflict'
  | 'no-balancing-valve'
  | 'valve-too-large'
  | 'valve-too-small'
  | 'no-size'
  | 'glycol-warm';

/** Velocity, Reynolds number and friction factor belong to pipes alone. `dropKpa` falls with the flow's direction; a pump's is minus its gain. */
export interface LinkResult {
  id: string;
  flowLs: number;
  dropKpa: number;
  velocityMs?: number;
  reynolds?: number;
  frictionFactor?: number;
  regime?: FlowRegime;
}

export type FlowRegime = 'at-rest' | 'laminar' | 'transition' | 'turbulent';

export interface NodeResult {
  id: string;
  pressureKpa: number;
  headM: number;
}

/** `shaftKw` is null without an efficiency at this flow. */
export interface PumpResult {
  id: string;
  flowLs: number;
  headM: number;
  hydraulicKw: number;
  shaftKw: number | null;
}

/** One correction of one loop: the head that was left around it, the slope it was divided by, and the flow put in. */
export interface LoopCorrection {
  sweep: number;
  loop: number;
  headM: number;
  slopeMPerLs: number;
  correctionLs: number;
}

export interface SolveResult {
  converged: boolean;
  method: Method;
  iterations: number;
  residuals: { continuityLs: number; loopPa: number };
  fluid: { densityKgM3: number; viscosityMPaS: number; specificHeatKJKgK: number };
  links: LinkResult[];
  nodes: NodeResult[];
  pumps: PumpResult[];
  warnings: Warning[];
  /** Where it did not close: worst loops and nodes, only when not converged. */
  worst?: { loops: { links: string[]; headPa: number }[]; nodes: { id: string; continuityLs: number }[] };
  /** With `options.history`: the loops (signed by direction) and every correction made to them. */
  history?: { loops: { link: string; direction: 1 | -1 }[][]; corrections: LoopCorrection[] };
}

export type ValveState = 'open' | 'throttled' | 'too-small' | 'too-large';

export interface BalancedPump {
  id: string;
  flowLs: number;
  requiredHeadM: number;
  speed: number;
  shaftKw: number | null;
}

/** `dropKpa` and `kv` are those at `setting` and design flow; `wantedKv` is what the loop asks for before table ends and steps. */
export interface BalancedValve {
  id: string;
  flowLs: number;
  dropKpa: number;
  kv: number;
  setting: number;
  state: ValveState;
  wantedKv: number;
}

export interface BalancedTerminal {
  id: string;
  designFlowLs: number;
  flowLs: number;
  percentOfDesign: number;
  circuitDropKpa: number | null;
  authority: number | null;
}

export interface BalanceResult {
  converged: boolean;
  indexTerminal: string | null;
  pumps: BalancedPump[];
  valves: BalancedValve[];
  terminals: BalancedTerminal[];
  solution: SolveResult;
  warnings: Warning[];
}

export interface SizedPipe {
  id: string;
  flowLs: number;
  nominal: string;
  boreMm: number;
  paPerM: number;
  velocityMs: number;
}

export interface SizeResult {
  converged: boolean;
  pipes: SizedPipe[];
  document: NetworkDocument;
  warnings: Warning[];
}
