import { removeSheet } from '~~/server/services/data-sheets'
import { useConfig } from '~~/server/utils/config'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** DELETE /api/attachments/data-sheets/3: takes a kept data sheet away. */
export default defineStudioHandler({
  may: 'edit materials',
  params: idParams,
  run: ({ db, studio, params }) => removeSheet(db, useConfig().storageFolder, studio.id, params.id),
})
