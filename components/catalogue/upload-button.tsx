'use client';

import { useMutation } from '@tanstack/react-query';
import { Upload } from 'lucide-react';
import { useRef } from 'react';
import { readTableFile } from '@/lib/client/catalogue';
import { uploadedCells } from '@/lib/catalogue/uploaded-cells';
import type { FigureColumn } from '@/lib/catalogue/figure-columns';
import { placeTable } from '@/lib/catalogue/place-table';
import { Button } from '../ui/button';

/** What a file gave: its rows in the order of the columns, and what of it a person should know. */
export interface TakenFile {
  fileName: string;
  rows: string[][];
  units: Record<string, string>;
  remarks: string[];
}

interface UploadButtonProps {
  columns: readonly FigureColumn[];
  onTaken: (taken: TakenFile) => void;
  /** The sentence of a refusal; null when a new file is on its way. */
  onRefused: (message: string | null) => void;
}

async function takeFile(file: File, columns: readonly FigureColumn[]): Promise<TakenFile> {
  const { table, sheet, sheets } = await readTableFile(file);
  const { cells, remarks } = uploadedCells(table);
  const placed = placeTable(cells, columns);
  if (!placed.ok) throw new Error(`${file.name}: ${placed.message} Nothing was taken.`);
  const aside = placed.leftAside.length ? [`Left aside: ${placed.leftAside.join(', ')}.`] : [];
  const sheetWords = sheets.length > 1 ? [`Of its ${sheets.length} sheets, “${sheet}”.`] : [];
  return { fileName: file.name, rows: placed.rows, units: placed.units, remarks: [...sheetWords, ...remarks, ...aside] };
}

/** Puts a file's figures into the table for the person to look at; nothing is stored. */
export function UploadButton({ columns, onTaken, onRefused }: UploadButtonProps) {
  const input = useRef<HTMLInputElement>(null);
  const upload = useMutation({
    mutationFn: (file: File) => takeFile(file, columns),
    onMutate: () => onRefused(null),
    onSuccess: onTaken,
    onError: (error) => onRefused(error.message),
  });
  return (
    <>
      <Button size="small" onClick={() => input.current?.click()} isPending={upload.isPending} pendingText="Reading…">
        <Upload size={14} aria-hidden /> Upload .xlsx or .csv
      </Button>
      <input
        ref={input}
        type="file"
        accept=".xlsx,.csv,.tsv,.txt"
        aria-label="A workbook or text file with the figures"
        className="hidden"
        onChange={(event) => {
          const file = event.target.files?.[0];
          // The same file, put right, can then be chosen again.
          event.target.value = '';
          if (file) upload.mutate(file);
        }}
      />
    </>
  );
}
