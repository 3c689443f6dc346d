'use client';

import { ToggleGroup } from 'radix-ui';
import { classNames } from '@/components/ui/class-names';
import { UnitName } from '@/components/ui/figure';
import type { Quantity } from '@/lib/units/quantities';
import type { Overlay } from './canvas-state';
import { signs, tones } from './deviation-mark';
import { useCanvas, useEditor, useResults } from './editor-context';

const overlayWords: Record<Overlay, { label: string; title: string; quantity?: Quantity }> = {
  percent: { label: '% of design', title: 'Per cent of design' },
  flow: { label: 'Flow', title: 'Flow', quantity: 'flow' },
  velocity: { label: 'Velocity', title: 'Velocity in pipes', quantity: 'velocity' },
  gradient: { label: 'Pa/m', title: 'Friction loss of pipes', quantity: 'gradient' },
  drop: { label: 'Drop', title: 'Pressure drop', quantity: 'pressure' },
  pressure: { label: 'Pressure', title: 'Gauge pressure at inlets and tees', quantity: 'pressure' },
  setting: { label: 'Setting', title: 'Settings for design flow', quantity: 'setting' },
};

const item =
  'h-8 rounded px-3 text-sm font-semibold whitespace-nowrap hover:bg-well data-[state=on]:bg-well data-[state=on]:shadow-[inset_0_-2px_0_var(--brass)] pointer-coarse:h-11';

/** Chooses which figure stands on the drawing. */
export function OverlayPicker() {
  const { canvasStore } = useEditor();
  const overlay = useCanvas((state) => state.overlay);
  return (
    <ToggleGroup.Root
      type="single"
      aria-label="Figures on the drawing"
      value={overlay}
      onValueChange={(value) => value && canvasStore.setState({ overlay: value as Overlay })}
      className="bg-sheet flex max-w-full gap-0.5 overflow-x-auto rounded border p-1"
    >
      {Object.entries(overlayWords).map(([id, { label }]) => (
        <ToggleGroup.Item key={id} value={id} className={item}>
          {label}
        </ToggleGroup.Item>
      ))}
    </ToggleGroup.Root>
  );
}

/** What the figures mean, and whether they are those of the valves as drawn or as balanced. */
export function Legend({ hasBothBases }: { hasBothBases: boolean }) {
  const { canvasStore, band } = useEditor();
  const { overlay, basis } = useCanvas((state) => state);
  const { isOld, figures } = useResults();
  const { title, quantity } = overlayWords[overlay];
  return (
    <section aria-label="Legend" className="bg-sheet rounded border px-3 py-2 text-xs">
      <p className="font-bold">
        {title}
        {quantity && (
          <span className="text-quiet ml-1 font-normal">
            <UnitName quantity={quantity} />
          </span>
        )}
        {isOld && figures && <span className="text-quiet ml-2 font-normal">earlier figures</span>}
      </p>
      {overlay === 'percent' && (
        <p className="mt-1 flex gap-3 whitespace-nowrap">
          <span className={tones.low}>
            {signs.low} under {band.lowerPercent}
          </span>
          <span>
            {signs.within} {band.lowerPercent} to {band.upperPercent}
          </span>
          <span className={tones.high}>
            {signs.high} over {band.upperPercent}
          </span>
        </p>
      )}
      {hasBothBases && (
        <ToggleGroup.Root
          type="single"
          aria-label="Valves"
          value={basis}
          onValueChange={(value) => value && canvasStore.setState({ basis: value as typeof basis })}
          className="mt-1.5 flex rounded border"
        >
          <ToggleGroup.Item value="drawn" className={basisItem}>
            Valves as drawn
          </ToggleGroup.Item>
          <ToggleGroup.Item value="balanced" className={classNames(basisItem, 'border-l')}>
            As balanced
          </ToggleGroup.Item>
        </ToggleGroup.Root>
      )}
    </section>
  );
}

const basisItem =
  'min-h-7 flex-1 px-2 font-semibold whitespace-nowrap hover:bg-well data-[state=on]:bg-well data-[state=on]:shadow-[inset_0_-2px_0_var(--brass)] pointer-coarse:min-h-11';
