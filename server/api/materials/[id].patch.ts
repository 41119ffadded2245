import { patchMaterial } from '~~/server/services/material-sheets'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { materialPatch } from '#shared/schemas/material-edit'

/** PATCH /api/materials/7: another name, or put away and brought back. */
export default defineStudioHandler({
  may: 'edit materials',
  params: idParams,
  body: materialPatch,
  run: ({ db, studio, member, params, body, now }) => patchMaterial(db, studio.id, member, params.id, body, now),
})
