import type { Knex } from 'knex';
import type { Signature } from '@/lib/api/reports';

export interface SignatureRow extends Signature {
  personId: string;
}

/** All signatures under the reports of a loop, oldest first. */
export async function readSignatures(connection: Knex, organizationId: string, loopId: string): Promise<SignatureRow[]> {
  const rows = await connection('signatures')
    .where({ organization_id: organizationId, loop_id: loopId })
    .orderBy(['signed_at', 'id'])
    .select({
      id: 'id',
      meaning: 'meaning',
      note: 'note',
      submission: 'submission',
      contentSha256: 'content_sha256',
      personId: 'person_id',
      personName: 'person_name',
      personRole: 'person_role',
      signedAt: 'signed_at',
    });
  return rows.map((row) => ({ ...row, signedAt: row.signedAt.toISOString() }));
}

/** Without whose account it was: that is for the rules alone. */
export const shownSignature = ({ personId: _, ...signature }: SignatureRow): Signature => signature;
