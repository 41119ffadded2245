import { setResponseStatus } from 'h3'
import { defineNitroPlugin } from 'nitropack/runtime'
import { absent } from '~~/server/utils/errors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { loggedPath } from '~~/server/utils/logged-path'

// Another address under /api/, or another method of one, is absent like any: not a page. As a file of server/api it would blur the types of all others.
// A route not built by the handler factory has asked nobody who may: its answer is withheld.
export default defineNitroPlugin((nitro) => {
  nitro.router.use('/api/**', defineStudioHandler({ may: 'anyone', run: () => absent() }))
  nitro.hooks.hook('beforeResponse', (event, response) => {
    if (!event.path.startsWith('/api/') || event.path.startsWith('/api/_auth/') || event.context.accessChecked) return
    console.error(`${event.method} ${loggedPath(event.path.split('?')[0] ?? '')} answered without asking who may.`)
    setResponseStatus(event, 500)
    response.body = { error: true, statusCode: 500, message: 'This answer was withheld.' }
  })
})
