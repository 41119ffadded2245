import { setResponseHeader } from 'h3'
import { exportReadings } from '~~/server/services/reading-export'
import { defineStudioHandler } from '~~/server/utils/handler'
import { isRefusal } from '~~/server/utils/errors'
import { idParams } from '#shared/schemas/common'

/** GET /api/rooms/7/readings.csv: every reading of a room as a file. */
export default defineStudioHandler({
  may: 'read the studio',
  params: idParams,
  run: ({ db, studio, params, now, event }) => {
    const made = exportReadings(db, studio, params.id, now)
    if (isRefusal(made)) return made
    setResponseHeader(event, 'content-type', 'text/csv; charset=utf-8')
    setResponseHeader(event, 'content-disposition', `attachment; filename="${made.fileName}"`)
    return made.text
  },
})
