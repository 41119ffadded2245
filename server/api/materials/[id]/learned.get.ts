import { learnedPart } from '~~/server/services/learned'
import { defineStudioHandler } from '~~/server/utils/handler'
import { may } from '#shared/permissions'
import { idParams } from '#shared/schemas/common'

/** GET /api/materials/7/learned: what this studio's touch tests teach about it. */
export default defineStudioHandler({
  may: 'read the studio',
  params: idParams,
  run: ({ db, studio, member, params, now }) => learnedPart(db, studio.id, params.id, now, may(member.role, 'see private mixes')),
})
