import type { Station } from '@/lib/api/commissioning';
import { instrumentError, kvAssumption } from '@/lib/commissioning/uncertainty';
import { Dialog } from '../ui/dialog';
import { IndirectFlow, IndirectUncertainty } from './indirect-working';
import { figure, Line } from './working-line';
import { bandWords } from './commissioning-context';
import type { Entry } from './use-entry';

interface WorkingDialogProps {
  entry: Entry;
  station: Station;
  fluid: { densityKgM3: number; specificHeatKJKgK: number };
  isOpen: boolean;
  onClose: () => void;
}

/** Every figure of the result with its formula, the numbers in it, their units and where they come from. */
export function WorkingDialog({ entry, station, fluid, isOpen, onClose }: WorkingDialogProps) {
  const { judgement, measured, meter, band } = entry;
  const { densityKgM3 } = fluid;
  return (
    <Dialog isOpen={isOpen} onClose={onClose} title={`Working at ${station.tag}`} isWide>
      {judgement && measured ? (
        <dl className="flex flex-col gap-4">
          {measured.method === 'valve-drop' ? (
            <>
              <Line
                name="Kv"
                formula={`Kv at ${exact(measured.settingTurns)} turns, straight between the points of the table`}
                value={`${figure(judgement.kv!, 3)} m³/h at 1 bar`}
              >
                Valve: {station.valveName || 'as drawn'}. {pointsAround(station, measured.settingTurns)}
              </Line>
              <Line
                name="Flow"
                formula={`q = Kv √(dp / SG) / 36 = ${figure(judgement.kv!, 3)} × √(${figure(measured.dropKpa, 3)} kPa / ${figure(densityKgM3 / 1000, 4)}) / 36`}
                value={`${figure(judgement.flowLs, 4)} L/s`}
              >
                The valve law of IEC 60534-2-1, turbulent; SG = density / 1000, {figure(densityKgM3, 1)} kg/m³ at the loop’s mean
                temperature.
              </Line>
            </>
          ) : (
            <IndirectFlow measured={measured} flowLs={judgement.flowLs} station={station} fluid={fluid} />
          )}
          <Line
            name="Of design"
            formula={`100 × ${figure(judgement.flowLs, 4)} L/s / ${figure(station.designFlowLs, 4)} L/s`}
            value={`${figure(judgement.percentOfDesign, 1)} %`}
          >
            Design flow of the issued revision. Band {bandWords(band)}: {band.source}.
          </Line>
          {meter && measured.method === 'valve-drop' && (
            <Line
              name="Uncertainty"
              formula={`u(q) = √(u(Kv)² + (u(dp) / (2 dp))²) = √(${kvAssumption.percent}² + (100 × ${figure(instrumentError(measured.dropKpa, meter), 3)} / (2 × ${figure(measured.dropKpa, 3)}))²)`}
              value={`±${figure(judgement.uncertaintyPercent, 1)} %`}
            >
              {kvAssumption.source}. Meter {meter.serial}: ±({exact(meter.accuracyPercent)} % of reading + {exact(meter.accuracyAbsolute)}{' '}
              kPa). Combined as uncorrelated inputs, JCGM 100:2008, 5.1.2.
            </Line>
          )}
          {meter && <IndirectUncertainty measured={measured} percent={judgement.uncertaintyPercent} meter={meter} />}
          {meter && measured.method === 'direct-flow' && (
            <Line
              name="Uncertainty"
              formula={`100 × ${figure(instrumentError(measured.flowLs, meter), 4)} / ${figure(measured.flowLs, 4)}`}
              value={`±${figure(judgement.uncertaintyPercent, 1)} %`}
            >
              Meter {meter.serial}: ±({exact(meter.accuracyPercent)} % of reading + {exact(meter.accuracyAbsolute)} L/s).
            </Line>
          )}
        </dl>
      ) : (
        <p className="text-quiet">Type the reading first; then every step stands here.</p>
      )}
    </Dialog>
  );
}

const exact = (value: number) => String(Number(value.toPrecision(6)));

function pointsAround({ kvTable }: Station, turns: number): string {
  if (!kvTable) return '';
  const after = kvTable.findIndex(({ setting }) => setting >= turns);
  return kvTable
    .slice(Math.max(after - 1, 0), after + 1)
    .map(({ setting, kv }) => `${exact(setting)} turns: Kv ${exact(kv)}`)
    .join('; ');
}
