import { ChevronLeft, ChevronRight } from 'lucide-react';
import { Button, buttonClass } from '../ui/button';
import { classNames } from '../ui/class-names';
import { fieldNames } from './entry-field';
import { NumberPad } from './number-pad';
import { PlaceLink } from './place-link';
import type { Entry } from './use-entry';

interface Neighbour {
  tag: string;
  path: string;
}

interface EntryPadProps {
  /** Null where nothing may be entered: then this is only the way to the next station. */
  entry: Entry | null;
  message: string | null;
  hasWaiting: boolean;
  before: Neighbour | null;
  next: Neighbour | null;
  listPath: string;
  onKeep: () => void;
}

const besideFigures =
  'landscape:bg-sheet landscape:w-[clamp(16rem,35vw,23.5rem)] landscape:overflow-y-auto landscape:border-t-0 landscape:border-l landscape:p-4';
const sideClass = `${buttonClass('secondary', 'touch')} h-14! px-3! text-base! no-underline landscape:h-12!`;
const keepClass = 'h-14! px-2! sm:text-xl!';
const keepBeside = 'landscape:order-1 landscape:col-span-2 landscape:h-20!';

/** The keys and what follows: keep and walk on. Beside the figures where the screen is wide, below them where it is tall. */
export function EntryPad({ entry, message, hasWaiting, before, next, listPath, onKeep }: EntryPadProps) {
  const onward = next ?? { tag: 'the list', path: listPath };
  // What was entered here waits to be sent and nothing new is typed: the way on is the next station.
  const isDone = entry?.isBlank === true && hasWaiting;
  const type = (key: string) => {
    if (!entry) return;
    // A unit typed behind the figure ends it: the next key begins a new one.
    const text = /[^\d.,]/.test(entry.typed[entry.active]) ? '' : entry.typed[entry.active];
    if (key === ',' && /[.,]/.test(text)) return;
    entry.setActive(entry.active);
    entry.type(entry.active, `${text}${key === ',' ? '.' : key}`);
  };
  return (
    <aside
      aria-label="Enter and go on"
      className={classNames('bg-paper flex shrink-0 flex-col gap-2 border-t p-3', entry && besideFigures)}
    >
      {entry && (
        <NumberPad
          into={fieldNames[entry.active]}
          onKey={type}
          onErase={() => entry.type(entry.active, entry.typed[entry.active].slice(0, -1))}
        />
      )}
      {message && (
        <p role="alert" className="text-high">
          ▴ {message}
        </p>
      )}
      <div className={classNames('grid grid-cols-[auto_1fr_auto] gap-2', entry && 'landscape:grid-cols-2')}>
        <PlaceLink
          href={before?.path ?? listPath}
          className={classNames(sideClass, entry && 'landscape:order-2 landscape:justify-self-start')}
        >
          <ChevronLeft size={18} aria-hidden />
          <span className="max-sm:sr-only">{before?.tag ?? 'List'}</span>
        </PlaceLink>
        {entry && !isDone ? (
          <Button size="touch" look="primary" className={classNames(keepClass, keepBeside)} onClick={onKeep}>
            {entry.isCorrecting ? 'Keep the correction' : next ? `Keep, next ${next.tag}` : 'Keep, back to the list'}
            <ChevronRight aria-hidden className="shrink-0" />
          </Button>
        ) : (
          <PlaceLink
            href={onward.path}
            className={classNames(buttonClass('primary', 'touch'), keepClass, entry && keepBeside, 'no-underline')}
          >
            Next {onward.tag}
            <ChevronRight aria-hidden className="shrink-0" />
          </PlaceLink>
        )}
        {entry && !isDone && (
          <PlaceLink href={onward.path} className={classNames(sideClass, 'landscape:order-2 landscape:justify-self-end')}>
            Skip
          </PlaceLink>
        )}
      </div>
    </aside>
  );
}
