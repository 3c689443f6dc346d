'use client';

import { useState } from 'react';
import type { Meaning } from '@/lib/api/reports';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { SignForm } from './sign-form';
import { signingWords } from './signing-words';

interface SignButtonsProps {
  loopId: string;
  maySign: Meaning[];
  contentSha256: string;
  notMeasured: string[];
}

/** One button for each signature that this person may give now. */
export function SignButtons({ loopId, maySign, contentSha256, notMeasured }: SignButtonsProps) {
  const [open, setOpen] = useState<Meaning | null>(null);
  const [notes, setNotes] = useState<Partial<Record<Meaning, string>>>({});
  return (
    <>
      {maySign.map((meaning) => (
        <Button
          key={meaning}
          look={meaning === 'returned' ? 'danger' : 'primary'}
          className="print:hidden"
          onClick={() => setOpen(meaning)}
        >
          {signingWords[meaning].action}
        </Button>
      ))}
      {open && (
        <Dialog isOpen onClose={() => setOpen(null)} title={signingWords[open].action} description={signingWords[open].explains}>
          <SignForm
            loopId={loopId}
            meaning={open}
            contentSha256={contentSha256}
            notMeasured={notMeasured}
            note={notes[open] ?? ''}
            onNote={(note) => setNotes((kept) => ({ ...kept, [open]: note }))}
            onDone={() => setOpen(null)}
          />
        </Dialog>
      )}
    </>
  );
}
