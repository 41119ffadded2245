import { renamePiece } from '~~/server/services/piece-renames'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { pieceName } from '#shared/schemas/piece-list'

/** PATCH /api/pieces/7: what it is called. */
export default defineStudioHandler({
  may: 'start batches',
  params: idParams,
  body: pieceName,
  run: ({ db, studio, member, params, body, now }) => renamePiece(db, studio.id, member, params.id, body.name, now),
})
