import { useId } from 'react';
import { unitsOf } from '@/lib/units/quantities';
import { classNames } from '../ui/class-names';
import { quantityOf, type Entry, type Field } from './use-entry';

export const fieldNames: Record<Field, string> = {
  setting: 'Setting',
  drop: 'Differential pressure',
  flow: 'Flow',
  heat: 'Heat',
  supply: 'Supply',
  return: 'Return',
  speed: 'Pump speed',
};

interface EntryFieldProps {
  entry: Entry;
  field: Field;
  onEnter: () => void;
}

/**
 * One figure at arm's length. The pad writes here; a keyboard too, even "74 mbar". The tablet's own keyboard stays away, which is what
 * inputMode none is for; the unit can be chosen beside the figure instead.
 */
export function EntryField({ entry, field, onEnter }: EntryFieldProps) {
  const id = useId();
  const units = unitsOf(quantityOf[field]);
  const message = entry.messageOf(field);
  const isActive = entry.active === field;
  return (
    <div className="min-w-0 flex-1">
      <div
        className={classNames(
          'bg-sheet relative rounded border outline-2 -outline-offset-1',
          message ? 'outline-high' : isActive ? 'outline-brass' : 'outline-transparent',
        )}
      >
        <label htmlFor={id} className="text-quiet pointer-events-none absolute top-2 left-3 text-sm sm:left-4">
          {fieldNames[field]}
          <span className="sr-only">, {entry.unitOf(field)}</span>
        </label>
        <input
          id={id}
          value={entry.typed[field]}
          onChange={(event) => entry.type(field, event.target.value)}
          onFocus={() => entry.setActive(field)}
          onKeyDown={(event) => {
            if (event.key !== 'Enter') return;
            // Else the same key presses the button that the question puts the focus on.
            event.preventDefault();
            onEnter();
          }}
          inputMode="none"
          enterKeyHint="next"
          autoComplete="off"
          maxLength={24}
          aria-invalid={Boolean(message)}
          aria-describedby={message ? `${id}-error` : undefined}
          className="figures h-[4.75rem] w-full bg-transparent pt-6 pr-18 pl-3 text-2xl outline-none sm:pr-24 sm:pl-4 sm:text-[1.75rem]"
        />
        {units.length > 1 ? (
          <select
            aria-label={`Unit of the ${fieldNames[field].toLowerCase()}`}
            value={entry.unitOf(field)}
            onChange={(event) => entry.chooseUnit(field, event.target.value)}
            className="text-quiet absolute right-1 bottom-1 h-12 max-w-20 rounded bg-transparent px-2 text-right"
          >
            {units.map((unit) => (
              <option key={unit} className="text-ink bg-sheet">
                {unit}
              </option>
            ))}
          </select>
        ) : (
          <span aria-hidden className="text-quiet absolute right-4 bottom-4">
            {units[0]}
          </span>
        )}
      </div>
      {message && (
        <p id={`${id}-error`} role="alert" className="text-high mt-1 text-sm">
          ▴ {message}
        </p>
      )}
    </div>
  );
}
