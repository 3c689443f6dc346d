'use client';

import { useMemo } from 'react';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { Figure, UnitName } from '@/components/ui/figure';
import { adoptSettings } from '@/lib/network/adopt-settings';
import type { Place } from '@/lib/network/drawing';
import { placeFinder } from '@/lib/network/drawing-to-document';
import type { BalancedValve } from '@/lib/hydraulics/types';
import { useDrawing, useEditor, useResults } from './editor-context';
import { useShowPlace } from './show-place';

const stateWords: Record<BalancedValve['state'], string> = {
  open: 'open',
  throttled: 'throttled',
  'too-small': '▴ too small',
  'too-large': '▾ too large',
};
const head = 'py-1 pl-2 text-right align-bottom text-xs font-semibold';
const cell = 'py-1 pl-2 text-right';

/** What the balance found: the setting of every valve and the duty of the pumps. */
export function SettingsTable() {
  const { solved } = useResults();
  const { drawingStore, canEdit } = useEditor();
  const drawing = useDrawing((it) => it);
  const show = useShowPlace();
  const placeOf = useMemo(() => placeFinder(drawing), [drawing]);
  const tagOf = useMemo(() => new Map(drawing.equipment.map(({ id, tag }) => [id, tag])), [drawing]);
  const button = (id: string) => <PlaceButton place={placeOf(id)} tag={tagOf.get(placeOf(id).id)} onPress={show} />;
  const balance = solved?.balance;
  if (!balance)
    return <p className="text-quiet py-4 text-sm">{solved?.balanceMissing ?? 'Settings appear here once the drawing can be solved.'}</p>;
  const adopt = () => {
    const { drawing: adopted, count } = adoptSettings(drawingStore.getState().drawing, balance.valves);
    if (count) drawingStore.getState().change(() => adopted);
    toast(
      count
        ? `${count} ${count === 1 ? 'valve takes its setting' : 'valves take their settings'} of the balance. Ctrl Z takes it back.`
        : 'The valves already stand so.',
    );
  };
  return (
    <div className="flex flex-col gap-4">
      <section>
        <h3>Pump duty</h3>
        <table className="mt-1 w-full text-sm">
          <thead>
            <tr className="text-quiet border-b">
              <th className="py-1 text-left text-xs font-semibold">Pump</th>
              <th className={head}>
                Flow <UnitName quantity="flow" />
              </th>
              <th className={head}>
                Head <UnitName quantity="head" />
              </th>
              <th className={head}>Speed %</th>
            </tr>
          </thead>
          <tbody>
            {balance.pumps.map((pump) => (
              <tr key={pump.id} className="border-b">
                <th scope="row" className="py-1 text-left font-normal">
                  {button(pump.id)}
                </th>
                <td className={cell}>
                  <Figure quantity="flow" si={pump.flowLs} />
                </td>
                <td className={cell}>
                  <Figure quantity="head" si={pump.requiredHeadM} />
                </td>
                <td className={`${cell} figures`}>{(pump.speed * 100).toFixed(1)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </section>
      <section>
        <div className="flex items-center justify-between gap-2">
          <h3>Valve settings</h3>
          {canEdit && balance.valves.length > 0 && (
            <Button size="small" onClick={adopt}>
              Adopt settings
            </Button>
          )}
        </div>
        <table className="mt-1 w-full text-sm">
          <thead>
            <tr className="text-quiet border-b">
              <th className="py-1 text-left text-xs font-semibold">Valve</th>
              <th className={head}>
                Setting <UnitName quantity="setting" />
              </th>
              <th className={head}>
                <UnitName quantity="valveCoefficient" />
              </th>
              <th className={head}>
                Drop <UnitName quantity="pressure" />
              </th>
            </tr>
          </thead>
          <tbody>
            {balance.valves.map((valve) => (
              <tr key={valve.id} className="border-b">
                <th scope="row" className="py-1 text-left font-normal">
                  {button(valve.id)}
                  <span className={`block text-xs ${valve.state.startsWith('too') ? 'text-high' : 'text-quiet'}`}>
                    {stateWords[valve.state]}
                  </span>
                </th>
                <td className={`${cell} figures text-brass font-bold`}>{valve.setting.toFixed(2)}</td>
                <td className={cell}>
                  <Figure quantity="valveCoefficient" si={valve.kv} />
                </td>
                <td className={cell}>
                  <Figure quantity="pressure" si={valve.dropKpa} />
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </section>
    </div>
  );
}

function PlaceButton({ place, tag, onPress }: { place: Place; tag: string | undefined; onPress: ReturnType<typeof useShowPlace> }) {
  return (
    <button type="button" onClick={() => onPress(place)} className="text-petrol hover:underline">
      {tag || 'untagged'}
    </button>
  );
}
