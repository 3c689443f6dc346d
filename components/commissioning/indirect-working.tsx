import type { Instrument, Station } from '@/lib/api/commissioning';
import { coilAssumption, curveAssumption } from '@/lib/commissioning/indirect-flow';
import type { Measured } from '@/lib/commissioning/judge-reading';
import { figure, Line } from './working-line';

interface IndirectFlowProps {
  measured: Measured;
  flowLs: number;
  station: Station;
  fluid: { densityKgM3: number; specificHeatKJKgK: number };
}

/** How the flow follows from what was read, where no balancing valve was read across. */
export function IndirectFlow({ measured, flowLs, station, fluid }: IndirectFlowProps) {
  const value = `${figure(flowLs, 4)} L/s`;
  switch (measured.method) {
    case 'coil-differential':
      return (
        <Line
          name="Flow"
          formula={`q = q design √(dp / dp design) = ${figure(station.designFlowLs, 4)} × √(${figure(measured.dropKpa, 2)} / ${figure(station.coilDropKpa ?? 0, 2)})`}
          value={value}
        >
          Turbulent through the coil (common practice); its drop at design flow as issued.
        </Line>
      );
    case 'pump-differential':
      return (
        <Line
          name="Flow"
          formula={`where the curve at ${figure(100 * measured.pumpSpeed, 1)} % gives H = dp / (ρ g) = ${figure((measured.dropKpa * 1000) / (fluid.densityKgM3 * 9.80665), 2)} m`}
          value={value}
        >
          The pump’s curve as issued, a monotone cubic through its points (Fritsch and Carlson 1980), at this speed by the affinity laws Q ~
          n, H ~ n². The differential is to be corrected for the heights of the gauges first.
        </Line>
      );
    case 'heat-balance':
      return (
        <Line
          name="Flow"
          formula={`q = P / (ρ c |ts − tr|) = ${figure(measured.heatKw, 2)} kW / (${figure(fluid.densityKgM3 / 1000, 4)} kg/L × ${figure(fluid.specificHeatKJKgK, 3)} kJ/kgK × ${figure(Math.abs(measured.supplyC - measured.returnC), 2)} K)`}
          value={value}
        >
          Steady load only. Density and specific heat at the loop’s mean temperature.
        </Line>
      );
    default:
      return <Line name="Flow" formula="as the meter shows it" value={value} />;
  }
}

/** How sure that flow is, and on what assumption. */
export function IndirectUncertainty({ measured, percent, meter }: { measured: Measured; percent: number; meter: Instrument }) {
  const value = `±${figure(percent, 1)} %`;
  const accuracy = `Meter ${meter.serial}: ±(${meter.accuracyPercent} % of reading + ${meter.accuracyAbsolute}).`;
  switch (measured.method) {
    case 'coil-differential':
      return (
        <Line name="Uncertainty" formula="u(q) = √(u(coil)² + (u(dp) / (2 dp))²)" value={value}>
          {coilAssumption.source}. {accuracy} Combined as uncorrelated inputs, JCGM 100:2008, 5.1.2.
        </Line>
      );
    case 'pump-differential':
      return (
        <Line name="Uncertainty" formula="u(q) = √(u(dp)² + u(curve)²) / |dH/dq|" value={value}>
          {curveAssumption.source}. {accuracy} A flat curve tells little of the flow.
        </Line>
      );
    case 'heat-balance':
      return (
        <Line name="Uncertainty" formula="u(q) = √2 u(t) / |ts − tr|" value={value}>
          The heat is taken as read. {accuracy}
        </Line>
      );
    default:
      return null;
  }
}
