import { listOutboxMails } from '~~/server/services/reminders'
import { useConfig } from '~~/server/utils/config'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/outbox: mails kept on the disk while no mail server is set. */
export default defineStudioHandler({
  may: 'read the outbox',
  run: ({ db, studio }) => listOutboxMails(db, studio.id, useConfig()),
})
