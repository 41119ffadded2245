import { materialSheet } from '~~/server/services/materials'
import { defineStudioHandler } from '~~/server/utils/handler'
import { may } from '#shared/permissions'
import { idParams } from '#shared/schemas/common'

/** GET /api/materials/7: its sheet; private parts of a mix only for those who may see them. */
export default defineStudioHandler({
  may: 'read the studio',
  params: idParams,
  run: ({ db, studio, member, params }) => materialSheet(db, studio.id, params.id, may(member.role, 'see private mixes')),
})
