'use client';

import { useId, useMemo, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import type { DraftBody } from '@/lib/api/loops';
import type { Drawing } from '@/lib/network/drawing';
import { mergeDrawings, same, takeTheirs, type Conflict, type Difference } from '@/lib/network/merge-drawings';

interface ConflictDialogProps {
  base: Drawing;
  mine: Drawing;
  theirs: DraftBody;
  onResolve: (merged: Drawing) => void;
  /** Looks at the drawing first; nothing is saved until the two are joined. */
  onLater: () => void;
}

/** Two people saved: what each changed, and for what both changed, whose stands. */
export function ConflictDialog({ base, mine, theirs, onResolve, onLater }: ConflictDialogProps) {
  const merge = useMemo(() => mergeDrawings(base, mine, theirs.drawing), [base, mine, theirs]);
  const [takenTheirs, setTakenTheirs] = useState<ReadonlySet<Conflict>>(new Set());
  const choose = (conflict: Conflict, isTheirs: boolean) => {
    const next = new Set(takenTheirs);
    if (isTheirs) next.add(conflict);
    else next.delete(conflict);
    setTakenTheirs(next);
  };
  const save = () => onResolve(merge.conflicts.filter((conflict) => takenTheirs.has(conflict)).reduce(takeTheirs, merge.merged));
  const savedAt = new Date(theirs.savedAt).toLocaleTimeString('en-GB');
  return (
    <Dialog
      isOpen
      onClose={onLater}
      isWide
      title={`${theirs.savedBy} saved this drawing meanwhile`}
      description={`At ${savedAt}, while you were drawing. Both sets of changes are kept${merge.conflicts.length ? '; where you changed the same piece, choose' : ''}.`}
    >
      {merge.conflicts.length > 0 && (
        <fieldset className="mb-4">
          <legend className="font-semibold">Changed by both</legend>
          <div className="mt-1 flex gap-2 pb-2">
            <Button size="small" onClick={() => setTakenTheirs(new Set())}>
              All mine
            </Button>
            <Button size="small" onClick={() => setTakenTheirs(new Set(merge.conflicts))}>
              All theirs
            </Button>
          </div>
          <ul className="border-t">
            {merge.conflicts.map((conflict) => (
              <ConflictRow
                key={`${conflict.place.kind}${conflict.place.id}`}
                conflict={conflict}
                theirName={theirs.savedBy}
                isTheirs={takenTheirs.has(conflict)}
                onChoose={(isTheirs) => choose(conflict, isTheirs)}
              />
            ))}
          </ul>
        </fieldset>
      )}
      <div className="grid gap-5 sm:grid-cols-2">
        <Changes title="Yours" differences={merge.differences.filter(({ by }) => by === 'you')} />
        <Changes title={theirs.savedBy} differences={merge.differences.filter(({ by }) => by === 'them')} />
      </div>
      <div className="mt-5 flex justify-end gap-2">
        <Button onClick={onLater}>Look at the drawing first</Button>
        <Button look="primary" onClick={save}>
          Save both together
        </Button>
      </div>
    </Dialog>
  );
}

function ConflictRow({
  conflict,
  theirName,
  isTheirs,
  onChoose,
}: {
  conflict: Conflict;
  theirName: string;
  isTheirs: boolean;
  onChoose: (isTheirs: boolean) => void;
}) {
  const name = useId();
  const option = 'flex min-h-11 cursor-pointer items-center gap-2 px-2';
  const [mine, other] = differingFields(conflict.mine, conflict.theirs);
  return (
    <li className="grid gap-x-4 border-b py-1 text-sm sm:grid-cols-[1fr_1fr_1fr]">
      <span className="self-center font-semibold">{conflict.name}</span>
      <label className={option}>
        <input type="radio" name={name} checked={!isTheirs} onChange={() => onChoose(false)} className="accent-petrol size-4" />
        <span>
          Mine <span className="text-quiet block text-xs break-all">{mine}</span>
        </span>
      </label>
      <label className={option}>
        <input type="radio" name={name} checked={isTheirs} onChange={() => onChoose(true)} className="accent-petrol size-4" />
        <span>
          {theirName} <span className="text-quiet block text-xs break-all">{other}</span>
        </span>
      </label>
    </li>
  );
}

/** The fields in which two versions of a piece differ, each side's values in words. */
function differingFields(mine: unknown, theirs: unknown): [string, string] {
  if (mine === null || theirs === null) return [mine === null ? 'removed' : 'kept', theirs === null ? 'removed' : 'kept'];
  const [a, b] = [mine as Record<string, unknown>, theirs as Record<string, unknown>];
  const keys = Object.keys({ ...a, ...b }).filter((key) => !same(a[key], b[key]));
  const tell = (side: Record<string, unknown>) => keys.map((key) => `${words(key)}: ${valueWords(side[key])}`).join(', ');
  return [tell(a), tell(b)];
}

/** `designFlowLs` reads as "design flow ls": the unit of the file stays with its number. */
const words = (key: string) => key.replace(/([A-Z])/g, ' $1').toLowerCase();

function valueWords(value: unknown): string {
  if (value === null || value === undefined || value === '') return 'none';
  if (typeof value !== 'object') return String(value);
  const named = (value as { name?: unknown }).name;
  return typeof named === 'string' && named ? named : 'changed';
}

const Changes = ({ title, differences }: { title: string; differences: Difference[] }) => (
  <section>
    <h3 className="border-b pb-1">
      {title}: {differences.length} {differences.length === 1 ? 'change' : 'changes'}
    </h3>
    <ul className="max-h-48 overflow-y-auto text-sm">
      {differences.map(({ message, place }) => (
        <li key={`${place.kind}${place.id}`} className="border-b py-1">
          {message}
        </li>
      ))}
    </ul>
  </section>
);
