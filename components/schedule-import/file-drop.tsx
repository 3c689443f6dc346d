'use client';

import { FileSpreadsheet } from 'lucide-react';
import { useId, useState } from 'react';
import { classNames } from '../ui/class-names';

/** A place to drop a file or to press and choose one. */
export function FileDrop({ isPending, onFile }: { isPending: boolean; onFile: (file: File) => void }) {
  const id = useId();
  const [isOver, setIsOver] = useState(false);
  return (
    <label
      htmlFor={id}
      onDragOver={(event) => {
        event.preventDefault();
        setIsOver(true);
      }}
      onDragLeave={() => setIsOver(false)}
      onDrop={(event) => {
        event.preventDefault();
        setIsOver(false);
        const file = event.dataTransfer.files[0];
        if (file && !isPending) onFile(file);
      }}
      className={classNames(
        'relative flex min-h-36 cursor-pointer flex-col items-center justify-center gap-2 rounded border border-dashed p-4 text-center',
        'has-focus-visible:outline-brass has-focus-visible:outline-2 has-focus-visible:outline-offset-2',
        isOver ? 'border-brass bg-paper' : 'border-quiet bg-well hover:bg-paper',
      )}
    >
      <FileSpreadsheet aria-hidden className="text-brass" />
      <span className="text-petrol font-semibold">{isPending ? 'Reading the file…' : 'Choose a file, or drop it here'}</span>
      <span className="text-quiet text-sm">XLSX or CSV, up to 10 MB and 5000 terminals. It is read, not kept.</span>
      <input
        id={id}
        type="file"
        accept=".xlsx,.xlsm,.csv,.tsv,.txt"
        aria-label="Schedule file"
        className="sr-only"
        disabled={isPending}
        onChange={(event) => {
          const file = event.target.files?.[0];
          // The same file may be chosen again after it was put right.
          event.target.value = '';
          if (file) onFile(file);
        }}
      />
    </label>
  );
}
