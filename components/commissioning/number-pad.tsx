import { Delete } from 'lucide-react';
import { classNames } from '../ui/class-names';

const keys = ['7', '8', '9', '4', '5', '6', '1', '2', '3', ',', '0'] as const;
const keyClass =
  'flex min-h-12 items-center justify-center rounded border border-transparent bg-well text-2xl select-none active:bg-rule portrait:min-h-13 landscape:min-h-16';

interface NumberPadProps {
  /** Told to a screen reader: which field the keys write in. */
  into: string;
  onKey: (key: string) => void;
  onErase: () => void;
}

/** Keys for gloves; they leave the focus in the field, so that the pad and a keyboard can be used by turns. */
export function NumberPad({ into, onKey, onErase }: NumberPadProps) {
  const stay = (event: { preventDefault: () => void }) => event.preventDefault();
  return (
    <div role="group" aria-label={`Number pad for ${into}`} className="grid min-h-0 flex-1 grid-cols-3 gap-2">
      {keys.map((key) => (
        <button
          key={key}
          type="button"
          aria-label={key === ',' ? 'Decimal comma or point' : key}
          onMouseDown={stay}
          onClick={() => onKey(key)}
          className={classNames(keyClass, 'figures')}
        >
          {key === ',' ? '. ,' : key}
        </button>
      ))}
      <button type="button" onMouseDown={stay} onClick={onErase} className={classNames(keyClass, 'gap-2 text-base font-semibold')}>
        <Delete size={18} aria-hidden /> Erase
      </button>
    </div>
  );
}
