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
  isSending: boolean;
  hasWaiting: boolean;
  before: Neighbour | null;
  next: Neighbour | null;
  listPath: string;
  onKeep: () => void;
}

/** The keys and what follows: keep and walk on. Beside the figures where the screen is wide, below them where it is tall. */
export function EntryPad({ entry, message, isSending, hasWaiting, before, next, listPath, onKeep }: EntryPadProps) {
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
      className="bg-paper landscape:bg-sheet flex shrink-0 flex-col gap-2 border-t p-3 landscape:w-[clamp(16rem,35vw,23.5rem)] landscape:overflow-y-auto landscape:border-t-0 landscape:border-l landscape:p-4"
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
      {entry && !isDone ? (
        <Button
          size="touch"
          look="primary"
          className="min-h-14 !text-xl landscape:min-h-20"
          isPending={isSending && entry.isBlank}
          pendingText="Sending…"
          onClick={onKeep}
        >
          {entry.isCorrecting ? 'Keep the correction' : next ? `Keep, next ${next.tag}` : 'Keep, back to the list'}
          <ChevronRight aria-hidden />
        </Button>
      ) : (
        <PlaceLink
          href={onward.path}
          className={classNames(buttonClass('primary', 'touch'), 'min-h-14 !text-xl no-underline landscape:min-h-20')}
        >
          Next {onward.tag}
          <ChevronRight aria-hidden />
        </PlaceLink>
      )}
      <div className="flex justify-between gap-2">
        <PlaceLink
          href={before?.path ?? listPath}
          className={classNames(buttonClass('secondary', 'touch'), '!px-3 !text-base no-underline')}
        >
          <ChevronLeft size={18} aria-hidden />
          {before?.tag ?? 'List'}
        </PlaceLink>
        {entry && !isDone && (
          <PlaceLink href={onward.path} className={classNames(buttonClass('secondary', 'touch'), '!px-3 !text-base no-underline')}>
            Skip
          </PlaceLink>
        )}
      </div>
    </aside>
  );
}
