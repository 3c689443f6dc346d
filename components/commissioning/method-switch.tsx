import type { ReadingMethod } from '@/lib/api/commissioning';
import { classNames } from '../ui/class-names';

export const methodNames: Record<ReadingMethod, string> = { 'valve-drop': 'Across the valve', 'direct-flow': 'Flow direct' };

interface MethodSwitchProps {
  method: ReadingMethod;
  /** False where the station has no valve with a table. */
  hasValve: boolean;
  onChoose: (method: ReadingMethod) => void;
}

export function MethodSwitch({ method, hasValve, onChoose }: MethodSwitchProps) {
  return (
    <fieldset className="bg-sheet flex rounded border">
      <legend className="sr-only">How the flow is measured</legend>
      {(Object.keys(methodNames) as ReadingMethod[]).map((it) => {
        const isOff = it === 'valve-drop' && !hasValve;
        return (
          <label
            key={it}
            className={classNames(
              'has-focus-visible:outline-brass flex h-12 flex-1 items-center justify-center rounded-[2px] font-semibold has-focus-visible:outline-2',
              it === method ? 'bg-ink text-paper' : isOff ? 'text-quiet opacity-60' : 'cursor-pointer',
            )}
          >
            <input type="radio" name="method" className="sr-only" checked={it === method} disabled={isOff} onChange={() => onChoose(it)} />
            {methodNames[it]}
          </label>
        );
      })}
    </fieldset>
  );
}
