import { createEventStream } from 'h3'
import type { EventStream, H3Event } from 'h3'
import { onChange } from '~~/server/utils/bus'

const beatMs = 20_000
const open = new Set<EventStream>()

/**
 * Opens a page's live stream. It says at once, on every committed change and every 20 seconds
 * `{ revision, at }`, with the revision as the event's id, so that silence is always a cut-off.
 * @param stillMay asked on every beat; false closes the stream (signed out, link revoked)
 */
export function openLive(event: H3Event, studio: { id: number, revision: number }, stillMay: () => boolean) {
  const stream = createEventStream(event)
  let revision = studio.revision
  const say = () => void stream.push({ id: String(revision), data: JSON.stringify({ revision, at: Date.now() }) })
  const stopListening = onChange((change) => {
    if (change.studioId !== studio.id) return
    revision = change.revision
    say()
  })
  const beat = setInterval(() => {
    if (stillMay()) say()
    else void stream.close()
  }, beatMs)
  open.add(stream)
  stream.onClosed(() => {
    stopListening()
    clearInterval(beat)
    open.delete(stream)
    return stream.close()
  })
  say()
  return stream.send()
}

/** Ends every stream: one left open holds a shutdown up until its time runs out. */
export function closeStreams(): void {
  for (const stream of open) void stream.close()
}
