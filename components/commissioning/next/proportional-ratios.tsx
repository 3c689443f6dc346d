import { Deviation } from '../../ui/deviation';
import { Sheet } from '../../ui/sheet';
import { Figures, Head, RowName, TableFrame, Words } from '../../ui/table';
import { placeOf, type Commissioning } from '../commissioning-context';
import { PlaceLink } from '../place-link';

/** The ratio of measured to design flow of each station as last read in this round. */
export function ProportionalRatios({ commissioning: { body, standing, base } }: { commissioning: Commissioning }) {
  const read = body.stations.flatMap((station) => {
    const reading = standing.get(station.id);
    return reading ? [{ station, reading }] : [];
  });
  if (read.length === 0) return null;
  return (
    <Sheet title="Ratios as last read" isFlush>
      <TableFrame label="Ratios">
        <thead>
          <tr>
            <Head>Station</Head>
            <Head>Place</Head>
            <Head isFigure unit="turns">
              Read at
            </Head>
            <Head isFigure unit="%">
              Of design
            </Head>
          </tr>
        </thead>
        <tbody>
          {read.map(({ station, reading }) => (
            <tr key={station.id}>
              <RowName>
                <PlaceLink href={`${base}/stations/${station.id}`}>{station.tag}</PlaceLink>
              </RowName>
              <Words className="text-quiet">{placeOf(station)}</Words>
              <Figures>{reading.settingTurns ?? '–'}</Figures>
              <Figures>
                <Deviation percent={reading.percentOfDesign} verdict={reading.verdict} />
              </Figures>
            </tr>
          ))}
        </tbody>
      </TableFrame>
    </Sheet>
  );
}
