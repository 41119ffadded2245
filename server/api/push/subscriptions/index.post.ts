import { saveSubscription } from '~~/server/services/subscriptions'
import { useConfig } from '~~/server/utils/config'
import { defineStudioHandler } from '~~/server/utils/handler'
import { subscriptionBody } from '#shared/schemas/telling'

/** POST /api/push/subscriptions: call me at this browser. */
export default defineStudioHandler({
  may: 'choose own calls',
  body: subscriptionBody,
  run: ({ db, studio, member, body, now }) => saveSubscription(db, studio.id, member.id, body, useConfig().allowLoopbackPush, now),
})
