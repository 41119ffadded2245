import { defineEventHandler, getRequestHeader } from 'h3'
import { useConfig } from '~~/server/utils/config'
import { notAllowed, toHttp } from '~~/server/utils/errors'
import { isOwnOrigin } from '~~/server/utils/origin'
import { refusals } from '#shared/words/refusals'

const reading = ['GET', 'HEAD', 'OPTIONS']

export default defineEventHandler((event) => {
  if (reading.includes(event.method)) return
  const header = (name: string) => getRequestHeader(event, name) ?? null
  const own = isOwnOrigin({ origin: header('origin'), fetchSite: header('sec-fetch-site'), host: header('host'), publicUrl: useConfig().publicUrl })
  if (!own) throw toHttp(notAllowed(refusals.foreignOrigin))
})
