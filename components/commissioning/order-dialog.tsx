'use client';

import { useMutation, useQueryClient } from '@tanstack/react-query';
import { ArrowDown, ArrowUp, ListOrdered } from 'lucide-react';
import { useState } from 'react';
import { commissioningQuery, writeWalkingOrder } from '@/lib/client/commissioning';
import { moved } from '@/lib/commissioning/walking-order';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { placeOf, type Commissioning } from './commissioning-context';

/** The order in which stations are walked, changed by hand where the building asks for another than the drawing. */
export function OrderDialog({ commissioning }: { commissioning: Commissioning }) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button size="touch" look="quiet" className="!px-3 !text-base" onClick={() => setOpen(true)}>
        <ListOrdered size={20} aria-hidden /> Walking order
      </Button>
      <Dialog
        isOpen={isOpen}
        onClose={() => setOpen(false)}
        title="Walking order"
        description="From the lowest storey along the drawing, unless it is changed here. The report keeps the drawing’s order."
      >
        <OrderList commissioning={commissioning} onDone={() => setOpen(false)} />
      </Dialog>
    </>
  );
}

function OrderList({ commissioning: { body, loop }, onDone }: { commissioning: Commissioning; onDone: () => void }) {
  const queries = useQueryClient();
  const [stations, setStations] = useState(() => [...body.stations].sort((a, b) => a.walkingOrder - b.walkingOrder));
  const save = useMutation({
    mutationFn: (stationIds: string[]) => writeWalkingOrder(loop.id, stationIds),
    onSuccess: async () => {
      await queries.invalidateQueries(commissioningQuery(loop.id));
      onDone();
    },
  });
  return (
    <div className="flex flex-col gap-4">
      <ol className="max-h-[50dvh] divide-y overflow-y-auto">
        {stations.map((station, at) => (
          <li key={station.id} className="flex items-center gap-2 py-1">
            <span className="min-w-0 flex-1 truncate">
              <strong>{station.tag}</strong> <span className="text-quiet text-sm">{placeOf(station)}</span>
            </span>
            <Button
              size="touch"
              look="quiet"
              className="!px-2"
              disabled={at === 0}
              aria-label={`${station.tag} earlier`}
              onClick={() => setStations(moved(stations, at, at - 1))}
            >
              <ArrowUp size={20} aria-hidden />
            </Button>
            <Button
              size="touch"
              look="quiet"
              className="!px-2"
              disabled={at === stations.length - 1}
              aria-label={`${station.tag} later`}
              onClick={() => setStations(moved(stations, at, at + 1))}
            >
              <ArrowDown size={20} aria-hidden />
            </Button>
          </li>
        ))}
      </ol>
      {save.error && (
        <p role="alert" className="text-high">
          ▴ {save.error.message}
        </p>
      )}
      <div className="flex flex-wrap justify-end gap-2">
        <Button size="touch" look="quiet" className="!text-base" onClick={() => save.mutate([])}>
          As on the drawing
        </Button>
        <Button
          size="touch"
          look="primary"
          className="!text-base"
          isPending={save.isPending}
          pendingText="Saving…"
          onClick={() => save.mutate(stations.map(({ id }) => id))}
        >
          Walk in this order
        </Button>
      </div>
    </div>
  );
}
