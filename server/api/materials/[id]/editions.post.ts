import { saveEdition } from '~~/server/services/material-sheets'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { editionBody } from '#shared/schemas/material-edit'

/** POST /api/materials/7/editions: new figures. A starter material becomes the studio's own by it. */
export default defineStudioHandler({
  may: 'edit materials',
  params: idParams,
  body: editionBody,
  run: ({ db, studio, member, params, body, now }) => saveEdition(db, studio, member, params.id, body, now),
})
