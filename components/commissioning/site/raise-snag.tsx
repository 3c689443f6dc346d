'use client';

import { useState } from 'react';
import { v7 as uuidv7 } from 'uuid';
import { raiseSnagSchema } from '@/lib/api/site';
import { clockOffsetMs } from '@/lib/client/server-clock';
import { Button } from '../../ui/button';
import { TextArea } from '../../ui/field';
import type { Commissioning } from '../commissioning-context';

interface RaiseSnagProps {
  commissioning: Commissioning;
  stationId?: string | null;
  tag?: string;
  onKept?: () => void;
}

/** Writes down a snag of a station, or of the loop where none is named. */
export function RaiseSnag({ commissioning, stationId = null, tag, onKept }: RaiseSnagProps) {
  const { outbox, loop } = commissioning;
  const [text, setText] = useState('');
  const [problem, setProblem] = useState<string>();
  const keep = async () => {
    const parsed = raiseSnagSchema.safeParse({
      id: uuidv7(),
      stationId,
      text,
      raisedAt: new Date().toISOString(),
      clockOffsetMs: clockOffsetMs(),
    });
    if (!parsed.success) return setProblem(parsed.error.issues[0]!.message);
    await outbox.keep(loop.id, tag ?? loop.name, { kind: 'snag', body: parsed.data });
    setText('');
    setProblem(undefined);
    void outbox.send();
    onKept?.();
  };
  return (
    <div className="flex flex-col gap-2">
      <TextArea
        label={tag ? `What is wrong at ${tag}?` : 'What is wrong?'}
        value={text}
        error={problem}
        maxLength={1000}
        className="text-lg"
        onChange={({ target }) => setText(target.value)}
      />
      <div className="flex justify-end">
        <Button size="touch" look="primary" className="!text-base" onClick={() => void keep()}>
          Keep the snag
        </Button>
      </div>
    </div>
  );
}
