import { bringInFile } from '~~/server/services/reading-imports'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { readingImportRequest } from '#shared/schemas/reading-import'

/** POST /api/rooms/7/imports: the readings of a logger's file, all or none. */
export default defineStudioHandler({
  may: 'add readings',
  params: idParams,
  body: readingImportRequest,
  run: ({ db, studio, member, params, body, now }) => bringInFile(db, studio.id, member.id, params.id, body, now),
})
