'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { z } from 'zod';
import { RequestError } from '@/lib/client/http';
import { generateOptionsSchema, MAX_SCHEDULED_TERMINALS, usualGenerateOptions } from '@/lib/network/generate/scheduled-terminal';
import type { ReadRow } from '@/lib/network/schedule-import/read-terminals';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { Notice } from '../ui/notice';
import { BuildOptions, type BuildValues } from './build-options';
import { GeneratedResult } from './generated-result';
import { isFaulty } from './row-filter';
import { Step } from './step';
import { useGenerate, type DrawnAlready } from './use-generate';

interface BuildStepProps {
  loopId: string;
  drawingHref: string;
  drawn: DrawnAlready;
  rows: readonly ReadRow[];
}

const formSchema = generateOptionsSchema.extend({ valveFamilyId: z.union([z.uuid(), z.literal('')]) });
const needsNumber = { error: () => 'A number above 0 and within reason is needed.' };

/** How the loop is built, and the one press that draws it; until then nothing is written anywhere. */
export function BuildStep({ loopId, drawingHref, drawn, rows }: BuildStepProps) {
  const form = useForm<BuildValues>({
    resolver: zodResolver(formSchema, needsNumber),
    defaultValues: { ...usualGenerateOptions, valveFamilyId: '' },
  });
  const work = useGenerate(loopId, drawn);
  const ready = rows.filter(({ terminal }) => terminal !== null);
  const faulty = rows.filter(isFaulty).length;
  const tooMany = ready.length > MAX_SCHEDULED_TERMINALS;
  const submit = form.handleSubmit(({ valveFamilyId, ...options }) =>
    work.generate({ terminals: ready.map(({ terminal }) => terminal!), options, valveFamilyId: valveFamilyId || null }),
  );

  return (
    <Step number={4} title="Say how the loop is built">
      <form onSubmit={submit} noValidate>
        <BuildOptions control={form.control} register={form.register} errors={form.formState.errors} />
        <div className="mt-6 flex flex-col gap-3 border-t pt-4">
          {work.error && <Refusal error={work.error} rows={ready} />}
          <div className="flex flex-wrap items-center gap-3">
            <Button
              type="submit"
              look="primary"
              disabled={ready.length === 0 || faulty > 0 || tooMany}
              isPending={work.isPending}
              pendingText={`Drawing, sizing and balancing… ${work.elapsedS} s`}
            >
              Generate the loop
            </Button>
            {work.isPending && <Button onClick={work.cancel}>Stop</Button>}
            <p role="status" className="text-quiet text-sm">
              {faulty > 0
                ? `${faulty === 1 ? 'One row is' : `${faulty} rows are`} faulty: put right what is marked above, or leave it out.`
                : tooMany
                  ? `${ready.length} terminals; a loop takes ${MAX_SCHEDULED_TERMINALS}. Leave some out.`
                  : ready.length === 0
                    ? 'No row is a terminal yet: see the columns above.'
                    : `${ready.length === 1 ? 'One terminal' : `${ready.length} terminals`} with pump, source, risers, branches and valves.`}
            </p>
          </div>
        </div>
      </form>
      <Dialog isOpen={work.isAsking} onClose={work.keepDrawing} title="Replace what is drawn?" description={replaceWords(work.known)}>
        <div className="flex flex-wrap justify-end gap-3">
          <Button onClick={work.keepDrawing}>Keep the drawing</Button>
          <Button look="danger" onClick={work.replace}>
            Replace it
          </Button>
        </div>
      </Dialog>
      {work.result && <GeneratedResult result={work.result} drawingHref={drawingHref} />}
    </Step>
  );
}

function replaceWords({ pieces, savedBy }: DrawnAlready): string {
  const saved = savedBy === null ? '' : `${savedBy} saved the drawing after you opened this page. `;
  const drawn = pieces === 0 ? 'Nothing is drawn' : pieces === 1 ? 'One piece is drawn' : `${pieces} pieces are drawn`;
  return `${saved}${drawn} in this loop. The generated loop takes the place of the drawing; issued revisions stay as they are, and terminals of the same tag keep their readings.`;
}

/** The server's refusal; what it says of a terminal is put to the row that the terminal came from. */
function Refusal({ error, rows }: { error: Error; rows: readonly ReadRow[] }) {
  const fields = error instanceof RequestError ? error.fields : [];
  return (
    <Notice tone="high" title={error.message}>
      {fields.length > 0 && (
        <ul>
          {fields.slice(0, 20).map(({ path, message }) => {
            const row = rows[Number(/^terminals\.(\d+)/.exec(path)?.[1] ?? -1)];
            return (
              <li key={path}>
                {row && `Row ${row.number}, ${row.texts.tag}: `}
                {message}
              </li>
            );
          })}
          {fields.length > 20 && <li>and {fields.length - 20} more.</li>}
        </ul>
      )}
    </Notice>
  );
}
