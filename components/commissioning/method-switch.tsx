import type { ReadingMethod } from '@/lib/api/commissioning';
import { readingMethods } from '@/lib/commissioning/reading-methods';
import { classNames } from '../ui/class-names';

interface MethodSwitchProps {
  method: ReadingMethod;
  /** The methods that the station's design allows. */
  possible: readonly ReadingMethod[];
  onChoose: (method: ReadingMethod) => void;
}

export function MethodSwitch({ method, possible, onChoose }: MethodSwitchProps) {
  return (
    <fieldset className="bg-sheet flex flex-wrap rounded border">
      <legend className="sr-only">How the flow is measured</legend>
      {possible.map((it) => (
        <label
          key={it}
          className={classNames(
            'has-focus-visible:outline-brass flex h-12 flex-1 items-center justify-center rounded-[2px] px-2 font-semibold whitespace-nowrap has-focus-visible:outline-2',
            it === method ? 'bg-ink text-paper' : 'cursor-pointer',
          )}
        >
          <input type="radio" name="method" className="sr-only" checked={it === method} onChange={() => onChoose(it)} />
          {readingMethods[it].name}
        </label>
      ))}
    </fieldset>
  );
}
