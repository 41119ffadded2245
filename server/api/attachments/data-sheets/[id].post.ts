import { keepSheet, sheetLimit } from '~~/server/services/data-sheets'
import { useConfig } from '~~/server/utils/config'
import { isRefusal } from '~~/server/utils/errors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { readUpload } from '~~/server/utils/upload'
import { idParams } from '#shared/schemas/common'
import { fileQuery } from '#shared/schemas/file'

/** POST /api/attachments/data-sheets/7?name=sheet.pdf: a data sheet for material 7, the file itself as the body. */
export default defineStudioHandler({
  may: 'edit materials',
  params: idParams,
  query: fileQuery,
  run: async ({ db, studio, params, query, now, event }) => {
    const data = await readUpload(event, sheetLimit)
    return isRefusal(data) ? data : keepSheet(db, useConfig().storageFolder, studio.id, params.id, data, query.name ?? null, now)
  },
})
