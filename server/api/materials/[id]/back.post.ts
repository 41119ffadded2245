import { goBack } from '~~/server/services/material-sheets'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { backBody } from '#shared/schemas/material-edit'

/** POST /api/materials/7/back: the figures of an earlier edition, as a new one. */
export default defineStudioHandler({
  may: 'edit materials',
  params: idParams,
  body: backBody,
  run: ({ db, studio, member, params, body, now }) => goBack(db, studio.id, member, params.id, body.no, body.basedOn, now),
})
