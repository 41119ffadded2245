import { setSheetFigures } from '~~/server/services/vapour-settings'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { sheetFiguresBody } from '#shared/schemas/vapour'

/** PUT /api/materials/7/limits: what the owner read in its data sheet. */
export default defineStudioHandler({
  may: 'change settings',
  params: idParams,
  body: sheetFiguresBody,
  run: ({ db, studio, member, params, body, now }) => setSheetFigures(db, studio.id, member.id, params.id, body, now),
})
