import { defineNitroPlugin } from 'nitropack/runtime'
import { useConfig } from '~~/server/utils/config'
import { useDatabase } from '~~/server/utils/database'
import { whenReady } from '~~/server/utils/ready'
import { goRounds } from '~~/server/utils/rounds'
import { addressSource } from '~~/server/weather/source'
import { takeWeather } from '~~/server/weather/take'

// Off unless an address is given: nothing leaves the studio's network by itself. Once at boot, then seven minutes past each hour.
export default defineNitroPlugin((nitro) => {
  if (import.meta.prerender) return
  const { weatherAddress } = useConfig()
  if (weatherAddress === null) return
  const source = addressSource(weatherAddress)
  const look = () => whenReady().then(() => source.hours()).then(hours => takeWeather(useDatabase(), hours, Date.now()))
    .catch(error => console.error('The weather could not be taken.', error instanceof Error ? error.message : error))
  void look()
  const endRounds = goRounds('7 * * * *', () => look())
  nitro.hooks.hook('close', async () => {
    await endRounds()
  })
})
