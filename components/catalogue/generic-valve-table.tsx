import { genericValves, genericValveSource } from '@/lib/network/valve-families';
import { Figure, UnitName } from '../ui/figure';
import { Sheet } from '../ui/sheet';
import { Figures, Head, RowName, TableFrame } from '../ui/table';
import { KvChart } from './kv-chart';
import { OwnDataMark } from './own-data-mark';

const sizes = genericValves.map(({ nominal, kvTable }) => ({ nominal, points: kvTable }));

/** The valves that come with Evenhead, marked as nobody's product. */
export const GenericValveTable = () => (
  <Sheet title={`Generic, ${sizes[0]!.nominal} to ${sizes.at(-1)!.nominal}`} action={<OwnDataMark />}>
    <p className="text-quiet mb-4 max-w-3xl text-sm">
      {genericValveSource} Kvs = 3600 A √(2·10⁵ Pa / (ρ ζ)) with ζ = 9 on the nominal bore; at the part x of its turns Kv = Kvs · x (0.12 +
      0.88 x<sup>1.2</sup>).
    </p>
    <div className="grid items-start gap-6 lg:grid-cols-2">
      <KvChart name="the generic valves" sizes={sizes} height={360} />
      <TableFrame label="Generic valves">
        <thead>
          <tr>
            <Head>Size</Head>
            <Head isFigure unit="turns">
              Open at
            </Head>
            <Head isFigure unit={<UnitName quantity="valveCoefficient" />}>
              At half its turns
            </Head>
            <Head isFigure unit={<UnitName quantity="valveCoefficient" />}>
              Fully open
            </Head>
          </tr>
        </thead>
        <tbody>
          {genericValves.map(({ nominal, turns, kvs, kvTable }) => (
            <tr key={nominal}>
              <RowName>{nominal}</RowName>
              <Figures>{turns}</Figures>
              <Figures>
                <Figure quantity="valveCoefficient" si={kvTable.find(({ setting }) => setting === turns / 2)?.kv} />
              </Figures>
              <Figures>
                <Figure quantity="valveCoefficient" si={kvs} />
              </Figures>
            </tr>
          ))}
        </tbody>
      </TableFrame>
    </div>
  </Sheet>
);
