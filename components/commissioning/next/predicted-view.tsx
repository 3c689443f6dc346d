'use client';

import type { PredictedPlan } from '@/lib/balancing/plan';
import type { PredictedSetting } from '@/lib/balancing/predict-settings';
import { Button } from '../../ui/button';
import { Figure, UnitName } from '../../ui/figure';
import { Notice } from '../../ui/notice';
import { Sheet } from '../../ui/sheet';
import { Figures, Head, onlyWide, RowName, TableFrame, Words } from '../../ui/table';
import { placeOf, type Commissioning } from '../commissioning-context';
import { PlaceLink } from '../place-link';
import { settingWords } from './setting-words';
import { stationFinder } from './station-finder';
import { UnknownSheet } from './unknown-sheet';
import { useRecordSetting } from './use-record-setting';

/** Every valve to set now with what its meter will show once all are set; what cannot be had; what the readings do not tell. */
export function PredictedView({ commissioning, predicted }: { commissioning: Commissioning; predicted: PredictedPlan | null }) {
  const { body } = commissioning;
  if (!predicted)
    return (
      <Notice tone="brass" title="Read the loop as found first">
        Nothing is read under this revision yet. Start a round, read every station once with nothing changed in between, and all settings
        are worked out at once.
      </Notice>
    );
  const { band } = body;
  const stationOf = stationFinder(commissioning);
  const changed = predicted.settings.filter(({ isChanged, link }) => isChanged && stationOf(link));
  const terminals = predicted.terminals.length - predicted.heldBack.length;
  return (
    <div className="flex flex-col gap-4">
      <p className="max-w-3xl">
        From <span className="figures">{predicted.readingsUsed}</span> readings:{' '}
        {changed.length === 0 ? (
          <strong>nothing to set.</strong>
        ) : (
          <strong>
            set {changed.length} {changed.length === 1 ? 'station' : 'stations'}, then read them again in a new round.
          </strong>
        )}{' '}
        Expected then: <span className="figures">{Math.round(terminals - predicted.expectedOutside)}</span> of{' '}
        <span className="figures">{terminals}</span> terminals inside {band.lowerPercent} to {band.upperPercent} % of design.
        {predicted.readingsLeftOut > 0 &&
          ` ${predicted.readingsLeftOut} readings were left out: the loop was changed around them, and too few were taken as it then stood.`}
      </p>
      {!predicted.isConverged && (
        <Notice tone="high" title="The fit did not come to rest">
          Settings below are worth little. Look at Findings: a reading or a valve there does not belong to this loop as it was drawn.
        </Notice>
      )}
      {predicted.heldBack.length > 0 && (
        <Notice tone="brass" title="Cannot have their design flow as they are">
          {predicted.heldBack
            .map(({ link, reachablePercent }) => `${stationOf(link)?.tag ?? link} reaches ${reachablePercent.toFixed(0)} %`)
            .join(', ')}
          . The others are balanced without waiting for them. Findings says what may be behind it.
        </Notice>
      )}
      {changed.length > 0 && <SettingsSheet commissioning={commissioning} changed={changed} />}
      <UnknownSheet commissioning={commissioning} unknown={predicted.unknown} />
      <p className="text-quiet max-w-3xl text-sm">
        Resistances, charts, pump and meters are fitted to the readings, maximum a posteriori with log-normal priors about the design and
        each reading weighed by its own error (least squares: Tarantola, Inverse Problem Theory, 2005, ch. 3). The spread behind ± is one
        standard deviation. Settings are rounded to a tenth of a turn or the valve’s own step.
      </p>
    </div>
  );
}

function SettingsSheet({ commissioning, changed }: { commissioning: Commissioning; changed: PredictedSetting[] }) {
  const { base, body, round, mayRecord } = commissioning;
  const stationOf = stationFinder(commissioning);
  const record = useRecordSetting(commissioning);
  const order = new Map(body.stations.map(({ id }, at) => [id, at]));
  const rows = changed
    .map((setting) => ({ setting, station: stationOf(setting.link)! }))
    .sort((a, b) => order.get(a.station.id)! - order.get(b.station.id)!);
  return (
    <Sheet title="Set these, in walking order" isFlush>
      <TableFrame label="Settings to make">
        <thead>
          <tr>
            <Head>Station</Head>
            <Head className={onlyWide}>Place</Head>
            <Head isFigure>Stands at</Head>
            <Head isFigure>Set to</Head>
            <Head isFigure unit={<UnitName quantity="pressure" />}>
              Meter then shows
            </Head>
            <Head isFigure className={onlyWide} unit={<UnitName quantity="flow" />}>
              Flow then
            </Head>
            {mayRecord && round && <Head>Done</Head>}
          </tr>
        </thead>
        <tbody>
          {rows.map(({ setting, station }) => (
            <tr key={setting.link} className="[&>*]:align-middle">
              <RowName>
                <PlaceLink href={`${base}/stations/${station.id}`}>{station.tag}</PlaceLink>
              </RowName>
              <Words className={`text-quiet ${onlyWide}`}>{placeOf(station)}</Words>
              <Figures>{settingWords(setting.kind, setting.from)}</Figures>
              <Figures className="font-bold">
                {setting.setting === setting.from ? 'set it again' : settingWords(setting.kind, setting.setting)}
              </Figures>
              <Figures>
                <Figure quantity="pressure" si={setting.expectedDropKpa} />
                <span className="text-quiet"> ±{setting.dropSpreadPercent.toFixed(0)} %</span>
              </Figures>
              <Figures className={onlyWide}>
                <Figure quantity="flow" si={Math.abs(setting.expectedFlowLs)} />
              </Figures>
              {mayRecord && round && (
                <Words>
                  <Button
                    size="touch"
                    className="!px-3 !text-base"
                    onClick={() => void record(station, setting.from, setting.setting)}
                    aria-label={`${station.tag} is set to ${settingWords(setting.kind, setting.setting)}`}
                  >
                    It is set
                  </Button>
                </Words>
              )}
            </tr>
          ))}
        </tbody>
      </TableFrame>
    </Sheet>
  );
}
