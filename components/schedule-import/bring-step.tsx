'use client';

import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import { readScheduleFile } from '@/lib/client/schedule-import';
import { readDelimitedText } from '@/lib/network/schedule-import/delimited-text';
import { exampleSchedule, exampleScheduleName } from '@/lib/network/schedule-import/example-schedule';
import type { ScheduleTable } from '@/lib/network/schedule-import/table';
import { Button } from '../ui/button';
import { SelectField, TextArea } from '../ui/field';
import { FormTrouble } from '../ui/form-trouble';
import { Notice } from '../ui/notice';
import { FileDrop } from './file-drop';
import { Step } from './step';
import type { BroughtSchedule } from './use-schedule';

interface BringStepProps {
  loopId: string;
  brought: BroughtSchedule | null;
  onBring: (brought: BroughtSchedule | null) => void;
}

const exampleHref = `data:text/csv;charset=utf-8,${encodeURIComponent(`\uFEFF${exampleSchedule}`)}`;

export function BringStep({ loopId, brought, onBring }: BringStepProps) {
  const [pasted, setPasted] = useState('');
  const [pasteTrouble, setPasteTrouble] = useState<string>();
  const upload = useMutation({
    mutationFn: ({ file, sheet }: { file: File; sheet?: string }) => readScheduleFile(loopId, file, sheet),
    onSuccess: ({ table, sheet }, { file }) => onBring({ table, from: sheet === null ? file.name : `${file.name}, sheet ${sheet}` }),
  });

  const readPasted = (text: string) => {
    const read = readDelimitedText(text);
    setPasteTrouble(read.ok ? undefined : read.message);
    if (!read.ok) return;
    upload.reset();
    onBring({ table: read.table, from: 'pasted cells' });
  };
  const startAgain = () => {
    upload.reset();
    setPasted('');
    onBring(null);
  };

  if (brought) {
    const sheets = upload.data?.sheets ?? [];
    return (
      <Step number={1} title="Bring the schedule" outcome={<Brought {...brought} />}>
        <div className="flex flex-col gap-3">
          <div className="flex flex-wrap items-end gap-3">
            {sheets.length > 1 && (
              <SelectField
                label="Sheet"
                value={upload.data?.sheet ?? ''}
                onChange={(event) => upload.mutate({ file: upload.variables!.file, sheet: event.target.value })}
              >
                {sheets.map((name) => (
                  <option key={name}>{name}</option>
                ))}
              </SelectField>
            )}
            <Button onClick={startAgain}>Bring another</Button>
          </div>
          <Marks table={brought.table} />
        </div>
      </Step>
    );
  }

  return (
    <Step number={1} title="Bring the schedule">
      <div className="grid gap-5 md:grid-cols-2">
        <div className="flex flex-col gap-2">
          <FileDrop isPending={upload.isPending} onFile={(file) => upload.mutate({ file })} />
          <p className="text-quiet text-sm">
            No schedule at hand?{' '}
            <a href={exampleHref} download={exampleScheduleName} className="underline">
              Download an example
            </a>{' '}
            to try with.
          </p>
        </div>
        <form
          className="flex flex-col gap-2"
          onSubmit={(event) => {
            event.preventDefault();
            readPasted(pasted);
          }}
        >
          <TextArea
            label="Or paste its cells"
            hint="copied from a spreadsheet, heads and all"
            rows={5}
            spellCheck={false}
            value={pasted}
            error={pasteTrouble}
            onChange={(event) => setPasted(event.target.value)}
            onPaste={(event) => {
              // Cells from a spreadsheet are the whole schedule; a single value is being typed together.
              const text = event.clipboardData.getData('text/plain');
              if (pasted === '' && text.includes('\n')) readPasted(text);
            }}
            className="figures text-xs"
          />
          <Button type="submit" className="self-start" disabled={pasted.trim() === ''}>
            Read these cells
          </Button>
        </form>
      </div>
      {upload.error && (
        <div className="mt-3">
          <FormTrouble message={upload.error.message} />
        </div>
      )}
    </Step>
  );
}

function Brought({ table, from }: BroughtSchedule) {
  return (
    <>
      <strong className="text-ink font-semibold break-all">{from}</strong>, {table.rows.length} rows, {table.rows[0]?.length ?? 0} columns
    </>
  );
}

/** What the cells were besides plain values. */
function Marks({ table }: { table: ScheduleTable }) {
  const count = (kind: ScheduleTable['marks'][number]['kind']) => table.marks.filter((mark) => mark.kind === kind).length;
  const cells = (number: number, rest: string) => number > 0 && `${number === 1 ? '1 cell' : `${number} cells`} ${rest}`;
  const said = [
    cells(count('formula'), 'with a formula: its last result was taken.'),
    cells(count('formula-without-result'), 'with a formula that was never calculated: named below where it matters.'),
    cells(count('merged'), 'merged with another: the one value was taken for each.'),
    cells(count('date'), 'with a date.'),
  ].filter((sentence) => sentence !== false);
  return said.length > 0 && <Notice>{said.join(' ')}</Notice>;
}
