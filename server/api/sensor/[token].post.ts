import { hearSensor } from '~~/server/services/sensors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { limitTries } from '~~/server/utils/rate-limit'
import { sensorBody, sensorToken } from '#shared/schemas/sensor'

/** POST /api/sensor/[token]: a sensor tells the air of its room. The secret is the key. */
export default defineStudioHandler({
  may: 'anyone',
  params: sensorToken,
  body: sensorBody,
  run: ({ db, params, body, event, now }) => limitTries(event, 'sensor', params.token, now) ?? hearSensor(db, params.token, body, now),
})
