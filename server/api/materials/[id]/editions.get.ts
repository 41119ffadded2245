import { listEditions } from '~~/server/services/material-editions'
import { defineStudioHandler } from '~~/server/utils/handler'
import { hiddenFrom } from '~~/server/services/private-materials'
import { absent } from '~~/server/utils/errors'
import { may } from '#shared/permissions'
import { idParams } from '#shared/schemas/common'

/** GET /api/materials/7/editions: its editions, newest first, each with what changed. */
export default defineStudioHandler({
  may: 'read the studio',
  params: idParams,
  run: ({ db, studio, member, params }) => {
    const seesPrivate = may(member.role, 'see private mixes')
    return hiddenFrom(db, studio.id, seesPrivate).has(params.id) ? absent() : listEditions(db, studio.id, params.id, seesPrivate, studio.units)
  },
})
