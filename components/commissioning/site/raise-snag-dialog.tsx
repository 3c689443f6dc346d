'use client';

import { TriangleAlert } from 'lucide-react';
import { useState } from 'react';
import type { Station } from '@/lib/api/commissioning';
import { Button } from '../../ui/button';
import { Dialog } from '../../ui/dialog';
import type { Commissioning } from '../commissioning-context';
import { RaiseSnag } from './raise-snag';

/** A snag of one station, without leaving its screen; says how many are open there. */
export function RaiseSnagDialog({ commissioning, station }: { commissioning: Commissioning; station: Station }) {
  const [isOpen, setOpen] = useState(false);
  const { site, outboxState, mayRaise } = commissioning;
  const open =
    site.snags.filter(({ stationId, resolution }) => stationId === station.id && !resolution).length +
    outboxState.entries.filter(({ content }) => content.kind === 'snag' && content.body.stationId === station.id).length;
  if (!mayRaise) return null;
  return (
    <>
      <Button size="touch" look="quiet" className="!px-3 !text-base" onClick={() => setOpen(true)}>
        <TriangleAlert size={20} aria-hidden /> Snag{open > 0 && `, ${open} open`}
      </Button>
      <Dialog isOpen={isOpen} onClose={() => setOpen(false)} title={`A snag at ${station.tag}`}>
        <RaiseSnag commissioning={commissioning} stationId={station.id} tag={station.tag} onKept={() => setOpen(false)} />
      </Dialog>
    </>
  );
}
