import type { KeptOf } from '@/lib/client/kept-entry';
import { Button } from '../ui/button';
import { enteredWords } from './entry-words';

interface WaitingEntryProps {
  entry: KeptOf<'reading'>;
  isSending: boolean;
  onSend: () => void;
  onTakeBack: () => void;
}

/** An entry that the server has not acknowledged: it stands here until it has, or until the person takes it back. */
export function WaitingEntry({ entry: { content, refusal }, isSending, onSend, onTakeBack }: WaitingEntryProps) {
  return (
    <div
      role={refusal ? 'alert' : 'status'}
      className={`bg-sheet flex flex-wrap items-center gap-x-4 gap-y-2 rounded border border-l-4 px-4 py-2 ${refusal ? 'border-l-high' : 'border-l-brass'}`}
    >
      <p className="min-w-48 flex-1">
        <span className="figures text-lg font-bold">{enteredWords(content.body.entered)}</span>
        <span className="block text-sm">
          {refusal ? (
            <span className="text-high">▴ Refused: {refusal}</span>
          ) : isSending ? (
            <span className="text-quiet">Being sent; kept on this tablet until it has arrived.</span>
          ) : (
            <span className="text-quiet">Not sent yet. It is kept on this tablet and sent again by itself.</span>
          )}
        </span>
      </p>
      {refusal ? (
        <Button size="touch" className="!text-base" onClick={onTakeBack}>
          Take it back
        </Button>
      ) : (
        <Button size="touch" className="!text-base" isPending={isSending} pendingText="Sending…" onClick={onSend}>
          Send now
        </Button>
      )}
    </div>
  );
}
