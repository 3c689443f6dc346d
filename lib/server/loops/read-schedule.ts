import type { Fault } from '@/lib/network/fault';
import { may } from '@/lib/api/permissions';
import { scheduleOf, type Schedule } from '@/lib/network/schedule-rows';
import type { Access } from '../auth/authorize';
import { listRevisions } from '../revisions/list-revisions';
import { readRevision } from '../revisions/read-revision';
import { solveDrawing } from '../solving/solve-drawing';
import { readDraft } from './read-draft';

export interface LoopSchedule {
  /** The draft's version, or the revision's number. */
  of:
    | { kind: 'draft'; version: number; savedBy: string; savedAt: string }
    | { kind: 'revision'; number: number; issuedBy: string; issuedAt: string };
  schedule: Schedule;
  /** What keeps the drawing from being solved; empty where it is solved. */
  errors: Fault[];
}

/** The schedule of the draft for those who may see it, of the newest revision for others; null where there is none for them yet. */
export async function readSchedule({ person, roles }: Access, loopId: string): Promise<LoopSchedule | null> {
  const asker = { personId: person.id };
  if (may(roles, 'draft.see')) {
    const { drawing, version, savedBy, savedAt } = await readDraft(person.organizationId, loopId);
    const { solved, faults } = await solveDrawing(drawing, loopId, asker);
    const schedule = scheduleOf(drawing, { solve: solved?.solve ?? null, balance: solved?.balance ?? null });
    return {
      of: { kind: 'draft', version, savedBy, savedAt },
      schedule,
      errors: solved ? [] : faults.filter(({ severity }) => severity === 'error'),
    };
  }
  const [newest] = await listRevisions(person.organizationId, loopId);
  if (!newest) return null;
  const { drawing, balance, number, issuedBy, issuedAt } = await readRevision(person.organizationId, loopId, newest.number);
  // The settings are those that were issued; only the flows as the valves stand are solved again.
  const { solved } = await solveDrawing(drawing, loopId, asker);
  return {
    of: { kind: 'revision', number, issuedBy, issuedAt },
    schedule: scheduleOf(drawing, { solve: solved?.solve ?? null, balance }),
    errors: [],
  };
}
