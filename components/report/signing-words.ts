import type { LoopState } from '@/lib/api/loops';
import type { Meaning } from '@/lib/api/reports';

interface SigningWords {
  /** Of the button that opens the dialog and of the one that signs. */
  action: string;
  pending: string;
  done: string;
  explains: string;
}

export const signingWords: Record<Meaning, SigningWords> = {
  submitted: {
    action: 'Submit report',
    pending: 'Submitting…',
    done: 'Submitted. The designer reviews it next.',
    explains: 'You sign that these are the readings as you took them. The open round is closed, and the designer reviews the report next.',
  },
  reviewed: {
    action: 'Sign as reviewed',
    pending: 'Signing…',
    done: 'Reviewed. The owner accepts it next.',
    explains: 'You sign that the loop, as measured, does what the design asks. The owner accepts the report next.',
  },
  returned: {
    action: 'Return to technician',
    pending: 'Returning…',
    done: 'Returned. The loop is in commissioning again.',
    explains: 'The loop goes back into commissioning. What is to be put right stands in your note.',
  },
  accepted: {
    action: 'Accept report',
    pending: 'Accepting…',
    done: 'Accepted. The report is kept as it is, for good.',
    explains: 'You accept the loop as handed over. This report and its workbook are frozen; nothing changes them any more.',
  },
};

export const meaningWords: Record<Meaning, string> = {
  submitted: 'Submitted',
  reviewed: 'Reviewed',
  returned: 'Returned',
  accepted: 'Accepted',
};

/** Who is next, for whoever reads the page. */
export const nextWords: Record<LoopState, string> = {
  draft: 'The designer issues a revision first.',
  issued: 'The technician starts a round of readings next.',
  'in-commissioning': 'The technician submits the report when the loop is measured.',
  submitted: 'The designer reviews it next.',
  reviewed: 'The owner accepts it next.',
  accepted: 'Handed over. A later round makes a new report.',
};
