import { setResponseStatus } from 'h3'
import { defineNitroPlugin } from 'nitropack/runtime'

// A route not built by the handler factory has asked nobody who may: its answer is withheld.
export default defineNitroPlugin((nitro) => {
  nitro.hooks.hook('beforeResponse', (event, response) => {
    if (!event.path.startsWith('/api/') || event.path.startsWith('/api/_auth/') || event.context.accessChecked) return
    console.error(`${event.method} ${event.path.split('?')[0]} answered without asking who may.`)
    setResponseStatus(event, 500)
    response.body = { error: true, statusCode: 500, message: 'This answer was withheld.' }
  })
})
