'use client';

import { useViewport } from 'reactflow';
import { Figure } from '@/components/ui/figure';
import { useDrawing } from './editor-context';

const NAME_AT = 20;

/** The storeys behind the drawing: a line between two, and the name and elevation of each at the left edge of the view. */
export function StoreyBands() {
  const storeys = useDrawing((drawing) => drawing.storeys);
  const { y, zoom } = useViewport();
  return (
    <div className="pointer-events-none absolute inset-0 -z-10 overflow-hidden">
      {storeys.map((storey) => {
        const top = storey.top * zoom + y;
        const bottom = (storey.top + storey.height) * zoom + y;
        return (
          <div key={storey.id} className="border-rule absolute inset-x-0 border-b-2" style={{ top, height: bottom - top }}>
            {bottom - top > 2 * NAME_AT && (
              <p className="text-quiet absolute bottom-1 left-3 text-xs font-semibold">
                {storey.name} <Figure quantity="length" si={storey.elevationM} hasUnit className="ml-1 font-normal" />
              </p>
            )}
          </div>
        );
      })}
    </div>
  );
}
