import type { Question } from '@/lib/commissioning/suspicion';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';

interface QuestionsDialogProps {
  questions: Question[];
  onLookAgain: () => void;
  onKeep: () => void;
}

/** What is odd about a reading, asked before it is kept; it may always be kept as it was read. */
export function QuestionsDialog({ questions, onLookAgain, onKeep }: QuestionsDialogProps) {
  return (
    <Dialog isOpen={questions.length > 0} onClose={onLookAgain} title="Before you keep it">
      <ul className="flex flex-col gap-2">
        {questions.map(({ code, message }) => (
          <li key={code} className="border-l-brass border-l-4 pl-3 text-lg">
            {message}
          </li>
        ))}
      </ul>
      <div className="mt-5 flex flex-wrap gap-3">
        <Button size="touch" look="primary" onClick={onLookAgain} autoFocus>
          Look again
        </Button>
        <Button size="touch" onClick={onKeep}>
          Keep it as read
        </Button>
      </div>
    </Dialog>
  );
}
