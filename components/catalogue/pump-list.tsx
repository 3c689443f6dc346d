'use client';

import type { CataloguePump } from '@/lib/api/catalogue';
import { removePump } from '@/lib/client/catalogue';
import { Figure, UnitName } from '../ui/figure';
import { Figures, Head, TableFrame } from '../ui/table';
import { EntryRow } from './entry-row';
import { PumpChart } from './pump-chart';

export const PumpList = ({ pumps, mayManage }: { pumps: CataloguePump[]; mayManage: boolean }) => (
  <ul className="bg-sheet divide-y rounded border">
    {pumps.map((pump) => (
      <EntryRow
        key={`${pump.id} ${pump.version}`}
        entry={pump}
        summary={
          <>
            {pump.points.length} points, up to <Figure quantity="head" si={pump.points[0]!.headM} hasUnit /> and{' '}
            <Figure quantity="flow" si={pump.points.at(-1)!.flowLs} hasUnit />
          </>
        }
        changeHref={mayManage ? `/catalogue/pumps/${pump.id}` : null}
        onRemove={() => removePump(pump)}
      >
        <div className="grid items-start gap-6 lg:grid-cols-2">
          <PumpChart name={pump.name} points={pump.points} />
          <PointList pump={pump} />
        </div>
      </EntryRow>
    ))}
  </ul>
);

const PointList = ({ pump }: { pump: CataloguePump }) => (
  <TableFrame label={`Points of ${pump.name}`}>
    <thead>
      <tr>
        <Head isFigure unit={<UnitName quantity="flow" />}>
          Flow
        </Head>
        <Head isFigure unit={<UnitName quantity="head" />}>
          Head
        </Head>
        <Head isFigure unit="%">
          Efficiency
        </Head>
        <Head isFigure unit={<UnitName quantity="head" />}>
          Suction head required
        </Head>
      </tr>
    </thead>
    <tbody>
      {pump.points.map(({ flowLs, headM, efficiency, suctionHeadM }) => (
        <tr key={flowLs}>
          <Figures>
            <Figure quantity="flow" si={flowLs} />
          </Figures>
          <Figures>
            <Figure quantity="head" si={headM} />
          </Figures>
          <Figures>{efficiency === null ? '–' : (100 * efficiency).toFixed(1)}</Figures>
          <Figures>
            <Figure quantity="head" si={suctionHeadM} />
          </Figures>
        </tr>
      ))}
    </tbody>
  </TableFrame>
);
