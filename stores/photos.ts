import { defineStore } from 'pinia'
import type { PhotoMoment } from '#shared/terms'

/** A photograph on its way to the studio. `share` of it is sent; `waiting`: not reached, kept and tried again; `refused` with the sentence why. */
export interface SentPhoto { key: string, pieceId: number, file: Blob, name: string, preview: string, step: string | null, moment: PhotoMoment, caption: string, state: 'sending' | 'waiting' | 'refused', share: number, message: string }

/** No answer for so long counts as not reached: sent twice under its key it is kept once. ms */
const answerMs = 120_000

/** Sends one picture with the share that is sent told as it goes; resolves to the sentence of a refusal, '' when it is kept, or null when the studio was not reached. */
function send(photo: SentPhoto, onShare: (share: number) => void): Promise<string | null> {
  const query = new URLSearchParams({ clientKey: photo.key, moment: photo.moment, caption: photo.caption, ...photo.step === null ? {} : { step: photo.step } })
  return new Promise((resolve) => {
    // The one way of the browser that says how much has been sent.
    const request = new XMLHttpRequest()
    request.open('POST', `/api/photos/pieces/${photo.pieceId}?${query}`)
    request.timeout = answerMs
    request.responseType = 'json'
    request.setRequestHeader('content-type', 'application/octet-stream')
    request.upload.onprogress = event => onShare(event.lengthComputable ? event.loaded / event.total : 0)
    request.onload = () => {
      const answer = request.response as { data?: { message?: string, fields?: Record<string, string> } } | null
      if (request.status < 300) resolve('')
      else if (request.status >= 500) resolve(null)
      else resolve(Object.values(answer?.data?.fields ?? {})[0] ?? answer?.data?.message ?? String(request.status))
    }
    request.onerror = request.ontimeout = request.onabort = () => resolve(null)
    request.send(photo.file)
  })
}

/** Photographs that are not told yet: they stay, whatever the connection does and wherever the person goes, until the studio has them. */
export const usePhotosStore = defineStore('photos', () => {
  const queue = shallowRef<SentPhoto[]>([])
  /** Grows with every picture that the studio has taken in. */
  const arrived = ref(0)
  let busy = false

  const change = (key: string, changes: Partial<SentPhoto>) => { queue.value = queue.value.map(each => (each.key === key ? { ...each, ...changes } : each)) }
  function drop(key: string) {
    const gone = queue.value.find(each => each.key === key)
    if (gone) URL.revokeObjectURL(gone.preview)
    queue.value = queue.value.filter(each => each.key !== key)
  }

  /** Sends what waits, one after the other; stops at the first that does not get through. */
  async function sendAll() {
    if (busy) return
    busy = true
    try {
      for (let next = queue.value.find(each => each.state !== 'refused'); next; next = queue.value.find(each => each.state !== 'refused')) {
        const { key } = next
        change(key, { state: 'sending', share: 0 })
        const said = await send(next, share => change(key, { share }))
        if (said === null) return change(key, { state: 'waiting' })
        if (said === '') {
          drop(key)
          arrived.value++
        }
        else change(key, { state: 'refused', message: said })
      }
    }
    finally {
      busy = false
    }
  }

  function add(photos: readonly Omit<SentPhoto, 'state' | 'share' | 'message' | 'preview'>[]) {
    queue.value = [...queue.value, ...photos.map(photo => ({ ...photo, preview: URL.createObjectURL(photo.file), state: 'sending' as const, share: 0, message: '' }))]
    void sendAll()
  }

  /** Asks before the page is left while pictures wait, and sends them when the connection is back. */
  function watchOver() {
    addEventListener('beforeunload', event => queue.value.some(each => each.state !== 'refused') && event.preventDefault())
    addEventListener('online', () => void sendAll())
    setInterval(() => queue.value.some(each => each.state === 'waiting') && void sendAll(), 15_000)
  }
  if (import.meta.client) watchOver()

  return { queue, arrived, add, drop, sendAll }
})
