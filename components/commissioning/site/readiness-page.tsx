'use client';

import { useState } from 'react';
import { v7 as uuidv7 } from 'uuid';
import { answerCheckSchema, type AnswerCheck, type CheckAnswer } from '@/lib/api/site';
import { clockOffsetMs } from '@/lib/client/server-clock';
import { checkWords, newestAnswers, readinessChecks, readinessSources, type ReadinessCheck } from '@/lib/commissioning/readiness-checks';
import { Button } from '../../ui/button';
import { TextField } from '../../ui/field';
import { Moment } from '../../ui/moment';
import { Sheet } from '../../ui/sheet';
import type { Commissioning } from '../commissioning-context';
import { Photos } from './photos';

const groups = [...new Set(readinessChecks.map(({ group }) => group))];

/** The checks before a reading means anything: who, when, with what remark and photo. */
export function ReadinessPage({ commissioning }: { commissioning: Commissioning }) {
  const answers = answersOf(commissioning);
  const open = readinessChecks.filter(({ key }) => (answers.get(key)?.answer ?? 'open') === 'open').length;
  return (
    <main className="mx-auto flex w-full max-w-4xl flex-1 flex-col gap-4 p-4 lg:py-6">
      <div>
        <h1>Readiness</h1>
        <p className="text-quiet">
          {open === 0 ? 'Every check is answered.' : `${open} of ${readinessChecks.length} checks are open.`} A round may be started all the
          same; the reason for it goes into the report.
        </p>
      </div>
      {groups.map((group) => (
        <Sheet key={group} title={group} isFlush>
          <ul className="divide-y">
            {readinessChecks
              .filter((check) => check.group === group)
              .map((check) => (
                <CheckRow key={check.key} commissioning={commissioning} check={check} answer={answers.get(check.key)} />
              ))}
          </ul>
        </Sheet>
      ))}
      <p className="text-quiet text-sm">{readinessSources}</p>
    </main>
  );
}

type Answer = Pick<CheckAnswer, 'checkKey' | 'answer' | 'remark' | 'answeredAt'> & { answeredBy: string | null };

/** Unsent answers count like sent ones. */
function answersOf({ site, outboxState, loop }: Commissioning): Map<string, Answer> {
  const kept = outboxState.entries.flatMap(({ loopId, content }): Answer[] =>
    loopId === loop.id && content.kind === 'check' ? [{ ...content.body, answeredBy: null }] : [],
  );
  return newestAnswers<Answer>([...site.checks, ...kept]);
}

function CheckRow({ commissioning, check, answer }: { commissioning: Commissioning; check: ReadinessCheck; answer: Answer | undefined }) {
  const { outbox, loop, mayRecord } = commissioning;
  const [remark, setRemark] = useState('');
  const [isOpen, setOpen] = useState(false);
  const [problem, setProblem] = useState<string>();
  const give = async (value: AnswerCheck['answer']) => {
    const parsed = answerCheckSchema.safeParse({
      id: uuidv7(),
      checkKey: check.key,
      answer: value,
      remark,
      answeredAt: new Date().toISOString(),
      clockOffsetMs: clockOffsetMs(),
    });
    if (!parsed.success) {
      setOpen(true);
      setProblem(parsed.error.issues[0]!.message);
      return;
    }
    await outbox.keep(loop.id, check.text, { kind: 'check', body: parsed.data });
    setRemark('');
    setOpen(false);
    setProblem(undefined);
    void outbox.send();
  };
  const stands = answer?.answer ?? 'open';
  return (
    <li className="flex flex-col gap-2 px-4 py-3">
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <div className="min-w-56 flex-1">
          <p className="text-lg">{check.text}</p>
          <p className="text-quiet text-sm">
            <span className={stands === 'open' ? 'text-low' : 'text-ink'}>{checkWords[stands]}</span>
            {answer && (
              <>
                , {answer.answeredBy ?? 'on this tablet'}, <Moment at={answer.answeredAt} />
              </>
            )}
            {answer?.remark && <>: “{answer.remark}”</>} · {check.source}
          </p>
        </div>
        {mayRecord && (
          <div className="flex flex-wrap gap-2">
            {stands !== 'done' && (
              <Button size="touch" className="!text-base" onClick={() => void give('done')}>
                Done
              </Button>
            )}
            {stands !== 'open' && (
              <Button size="touch" className="!text-base" onClick={() => void give('open')}>
                Open again
              </Button>
            )}
            {stands === 'open' && (
              <Button size="touch" className="!text-base" onClick={() => void give('not-applicable')}>
                Does not apply
              </Button>
            )}
            <Button size="touch" look="quiet" className="!text-base" aria-expanded={isOpen} onClick={() => setOpen(!isOpen)}>
              Remark
            </Button>
          </div>
        )}
      </div>
      {isOpen && (
        <TextField
          label="Remark, or why it does not apply"
          value={remark}
          error={problem}
          className="!h-12 text-lg"
          maxLength={1000}
          onChange={({ target }) => setRemark(target.value)}
        />
      )}
      <Photos commissioning={commissioning} subject="check" subjectId={check.key} tag={check.text} />
    </li>
  );
}
