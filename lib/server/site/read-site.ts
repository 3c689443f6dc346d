import type { Knex } from 'knex';
import { db } from '@/db/knex';
import type { SiteBody } from '@/lib/api/site';

/** Checks, snags, photos and changes of setting of a loop, each oldest first. */
export async function readSite(organizationId: string, loopId: string, connection: Knex = db()): Promise<SiteBody> {
  const [checks, snags, settingChanges, photos] = await Promise.all([
    entered(connection, 'check_answers', organizationId, loopId).select({
      checkKey: 'check_answers.check_key',
      answer: 'check_answers.answer',
      remark: 'check_answers.remark',
    }),
    entered(connection, 'snags', organizationId, loopId)
      .leftJoin('snag_resolutions as done', (join) =>
        join.on('done.organization_id', 'snags.organization_id').on('done.snag_id', 'snags.id'),
      )
      .leftJoin('people as doer', (join) => join.on('doer.organization_id', 'done.organization_id').on('doer.id', 'done.entered_by'))
      .select({
        number: 'snags.number',
        stationId: 'snags.station_id',
        text: 'snags.text',
        doneNote: 'done.note',
        doneAt: 'done.entered_at',
        doneBy: 'doer.name',
      }),
    entered(connection, 'setting_changes', organizationId, loopId).select({
      roundId: 'setting_changes.round_id',
      stationId: 'setting_changes.station_id',
      before: 'setting_changes.before',
      after: 'setting_changes.after',
      note: 'setting_changes.note',
    }),
    entered(connection, 'photos', organizationId, loopId).select({
      subject: 'photos.subject',
      subjectId: 'photos.subject_id',
      widthPx: 'photos.width_px',
      heightPx: 'photos.height_px',
    }),
  ]);
  return {
    checks: checks.map(({ at, by, ...row }) => ({ ...row, answeredAt: at.toISOString(), answeredBy: by })),
    snags: snags.map(({ at, by, doneNote, doneAt, doneBy, ...row }) => ({
      ...row,
      raisedAt: at.toISOString(),
      raisedBy: by,
      resolution: doneAt && { note: doneNote, resolvedBy: doneBy, resolvedAt: doneAt.toISOString() },
    })),
    settingChanges: settingChanges.map(({ at, by, ...row }) => ({ ...row, changedAt: at.toISOString(), changedBy: by })),
    photos: photos.map(({ at, by, ...row }) => ({ ...row, takenAt: at.toISOString(), takenBy: by })),
  };
}

type SiteTable = 'check_answers' | 'snags' | 'setting_changes' | 'photos';

const entered = (connection: Knex, table: SiteTable, organizationId: string, loopId: string) =>
  connection(table)
    .join('people', (join) => join.on('people.organization_id', `${table}.organization_id`).on('people.id', `${table}.entered_by`))
    .where({ [`${table}.organization_id`]: organizationId, [`${table}.loop_id`]: loopId })
    .orderBy([`${table}.entered_at`, `${table}.id`])
    .select({ id: `${table}.id`, at: `${table}.entered_at`, by: 'people.name' });
