import { validate as isUuid } from 'uuid';
import { db } from '@/db/knex';
import type { Instrument, InstrumentInput } from '@/lib/api/commissioning';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { notFound, Problem } from '../problem';
import { instrumentRow, unlessSerialTaken } from './instrument-row';

/** Changes a meter's entry. Readings keep what they were judged by: flow, uncertainty, and whether the meter was overdue that day. */
export async function changeInstrument(access: Access, instrumentId: string, input: InstrumentInput): Promise<Instrument> {
  const { organizationId } = access.person;
  if (!isUuid(instrumentId)) throw notFound();
  await unlessSerialTaken(
    db().transaction(async (trx) => {
      const known = await trx('instruments')
        .where({ organization_id: organizationId, id: instrumentId })
        .forUpdate()
        .first('kind', 'is_retired');
      if (!known) throw notFound();
      if (known.kind !== input.kind) {
        const message = 'What a meter reads does not change. Add another.';
        throw new Problem('input-invalid', message, { fields: [{ path: 'kind', message }] });
      }
      await trx('instruments').where({ organization_id: organizationId, id: instrumentId }).update(instrumentRow(input));
      const verb = input.isRetired === known.is_retired ? 'changed' : input.isRetired ? 'retired' : 'took back into use';
      await recordActivity(trx, access, { verb, subject: `the meter ${input.name}, serial ${input.serial}` });
    }),
  );
  return { id: instrumentId, ...input };
}
