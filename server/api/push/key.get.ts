import { pushKeys } from '~~/server/push/keys'
import { useConfig } from '~~/server/utils/config'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/push/key: the public half of the push keys, which a browser needs to subscribe. */
export default defineStudioHandler({
  may: 'choose own calls',
  run: ({ db }) => ({ publicKey: pushKeys(db, useConfig().pushKeys).publicKey }),
})
