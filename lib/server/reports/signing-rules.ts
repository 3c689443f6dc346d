import type { LoopState } from '@/lib/api/loops';
import { may, type Permission, type ProjectRole, type Role } from '@/lib/api/permissions';
import { meanings, type Meaning } from '@/lib/api/reports';
import type { ReportContent } from '@/lib/api/reports';
import type { SignatureRow } from './read-signatures';

interface SigningRule {
  from: LoopState[];
  to: LoopState;
  permission: Permission;
  signsAs: ProjectRole;
  /** What has to come first, for the sentence that refuses. */
  before: string;
}

/** A loop's life from measuring to the owner's signature. */
export const signingRules: Record<Meaning, SigningRule> = {
  submitted: {
    from: ['in-commissioning'],
    to: 'submitted',
    permission: 'report.submit',
    signsAs: 'technician',
    before: 'A report is submitted while its loop is in commissioning',
  },
  reviewed: {
    from: ['submitted'],
    to: 'reviewed',
    permission: 'report.review',
    signsAs: 'designer',
    before: 'A report is reviewed after it was submitted',
  },
  returned: {
    from: ['submitted', 'reviewed'],
    to: 'in-commissioning',
    permission: 'report.review',
    signsAs: 'designer',
    before: 'A report is returned after it was submitted',
  },
  accepted: {
    from: ['reviewed'],
    to: 'accepted',
    permission: 'report.accept',
    signsAs: 'owner',
    before: 'A report is accepted after it was reviewed',
  },
};

export interface Standing {
  state: LoopState;
  contentSha256: string;
  /** Of the whole loop, oldest first. */
  signatures: SignatureRow[];
}

/** The submission that signatures now stand under; 0 before the first. */
export const submissionOf = (signatures: SignatureRow[]): number => Math.max(0, ...signatures.map(({ submission }) => submission));

export const hasSigned = ({ signatures }: Standing, personId: string): boolean =>
  signatures.some((signature) => signature.submission === submissionOf(signatures) && signature.personId === personId);

/** Whether the content is still what the technician signed. */
export const isAsSubmitted = ({ signatures, contentSha256 }: Standing): boolean =>
  signatures.findLast(({ meaning }) => meaning === 'submitted')?.contentSha256 === contentSha256;

/** Whether the loop's state lets this be signed. What changed since it was submitted is submitted again, so that all sign the same. */
export function isOpenFor(meaning: Meaning, standing: Standing): boolean {
  if (signingRules[meaning].from.includes(standing.state)) return true;
  return meaning === 'submitted' && (standing.state === 'submitted' || standing.state === 'reviewed') && !isAsSubmitted(standing);
}

/** What a person may put under the report as it stands. */
export function signableBy(person: { id: string; roles: readonly Role[] }, content: ReportContent, standing: Standing): Meaning[] {
  return meanings.filter((meaning) => {
    if (!may(person.roles, signingRules[meaning].permission) || !isOpenFor(meaning, standing)) return false;
    if (meaning === 'submitted') return content.stations.some(({ kind, reading }) => kind === 'terminal' && reading);
    if (hasSigned(standing, person.id)) return false;
    return meaning === 'returned' || isAsSubmitted(standing);
  });
}
