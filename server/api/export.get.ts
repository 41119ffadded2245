import { Readable } from 'node:stream'
import { setResponseHeaders } from 'h3'
import { studioArchive } from '~~/server/services/export'
import { useConfig } from '~~/server/utils/config'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/export: everything the studio has told, as one ZIP file. */
export default defineStudioHandler({
  may: 'export',
  run: ({ studio, now, event }) => {
    setResponseHeaders(event, { 'content-type': 'application/zip', 'content-disposition': `attachment; filename="stillwet-${new Date(now).toISOString().slice(0, 10)}.zip"` })
    return Readable.from(studioArchive(useConfig(), studio, now))
  },
})
