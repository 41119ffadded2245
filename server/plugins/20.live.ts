import { defineNitroPlugin } from 'nitropack/runtime'
import { closeStreams } from '~~/server/live/streams'

// On the signal itself: the server's close hook runs only once all connections have ended.
export default defineNitroPlugin(() => {
  process.once('SIGTERM', closeStreams)
  process.once('SIGINT', closeStreams)
})
