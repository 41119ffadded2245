import { draftOfPiece } from '~~/server/services/schedule-offers'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** GET /api/pieces/7/schedule-draft: a schedule made of what was done to it, to be looked over before it is kept. */
export default defineStudioHandler({
  may: 'edit schedules',
  params: idParams,
  run: ({ db, studio, params }) => draftOfPiece(db, studio, params.id),
})
