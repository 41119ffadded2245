import { changeParts } from '~~/server/services/mixes'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { mixPartsBody } from '#shared/schemas/material-edit'

/** POST /api/materials/7/mix: other parts of a mix, as a new edition. */
export default defineStudioHandler({
  may: 'edit materials',
  params: idParams,
  body: mixPartsBody,
  run: ({ db, studio, member, params, body, now }) => changeParts(db, studio.id, member, params.id, body, now),
})
