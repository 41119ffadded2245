import { readSheetFile } from '~~/server/services/data-sheets'
import { useConfig } from '~~/server/utils/config'
import { isRefusal } from '~~/server/utils/errors'
import { sendFile } from '~~/server/utils/send-file'
import { defineStudioHandler } from '~~/server/utils/handler'
import { may } from '#shared/permissions'
import { idParams } from '#shared/schemas/common'

/** GET /api/attachments/data-sheets/3: a kept data sheet, to be saved. */
export default defineStudioHandler({
  may: 'read the studio',
  params: idParams,
  run: async ({ db, studio, member, params, event }) => {
    const found = await readSheetFile(db, useConfig().storageFolder, studio.id, params.id, may(member.role, 'see private mixes'))
    return isRefusal(found) ? found : sendFile(event, found, 'attachment')
  },
})
