import { createMaterial } from '~~/server/services/material-sheets'
import { defineStudioHandler } from '~~/server/utils/handler'
import { dataSheetBody } from '#shared/schemas/material-edit'

/** POST /api/materials: a new material from its data sheet. */
export default defineStudioHandler({
  may: 'edit materials',
  body: dataSheetBody,
  run: ({ db, studio, member, body, now }) => createMaterial(db, studio, member, body, now),
})
