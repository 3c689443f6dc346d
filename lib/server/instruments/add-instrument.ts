import { v7 as uuidv7 } from 'uuid';
import { db } from '@/db/knex';
import type { Instrument, InstrumentInput } from '@/lib/api/commissioning';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { instrumentRow, unlessSerialTaken } from './instrument-row';

export async function addInstrument(access: Access, input: InstrumentInput): Promise<Instrument> {
  const { organizationId } = access.person;
  const id = uuidv7();
  await unlessSerialTaken(
    db().transaction(async (trx) => {
      await trx('instruments').insert({ organization_id: organizationId, id, ...instrumentRow(input) });
      await recordActivity(trx, access, { verb: 'added', subject: `the meter ${input.name}, serial ${input.serial}` });
    }),
  );
  return { id, ...input };
}
