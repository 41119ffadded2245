import { readDraft } from '~~/server/services/schedule-edits'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { editionQuery } from '#shared/schemas/schedule-draft'

/** GET /api/schedules/7/draft?no=2: an edition to edit or copy, the newest without a number. */
export default defineStudioHandler({
  may: 'edit schedules',
  params: idParams,
  query: editionQuery,
  run: ({ db, studio, params, query }) => readDraft(db, studio.id, params.id, query.no),
})
