import type { ShallowRef } from 'vue'

export type CameraState = 'starting' | 'looking' | 'none' | 'refused' | 'failed' | 'insecure'

/** Between two looks at the picture, ms: the phone stays cool and the page answers. */
const pause = 160

const stateOf = (error: unknown): CameraState => {
  const name = error instanceof DOMException ? error.name : ''
  if (name === 'NotAllowedError' || name === 'SecurityError') return 'refused'
  return name === 'NotFoundError' || name === 'OverconstrainedError' ? 'none' : 'failed'
}

/**
 * The camera at the back of the device, and the texts of the codes that it sees. It runs while the component that asked for it
 * stands on the page and is let go with it, also when the answer of the browser comes later.
 */
export function useCamera(video: Readonly<ShallowRef<HTMLVideoElement | null>>, seen: (texts: string[]) => void) {
  const state = ref<CameraState>('starting')
  let stream: MediaStream | null = null
  let gone = false
  let timer: ReturnType<typeof setTimeout> | undefined

  function letGo() {
    clearTimeout(timer)
    for (const track of stream?.getTracks() ?? []) track.stop()
    stream = null
  }

  async function start() {
    letGo()
    state.value = 'starting'
    if (!navigator.mediaDevices?.getUserMedia) {
      state.value = window.isSecureContext ? 'none' : 'insecure'
      return
    }
    try {
      stream = await navigator.mediaDevices.getUserMedia({ audio: false, video: { facingMode: { ideal: 'environment' }, width: { ideal: 1280 }, height: { ideal: 720 } } })
      const { makeDecoder } = await import('./scan/decoder')
      const decode = await makeDecoder()
      if (gone || !video.value) return letGo()
      video.value.srcObject = stream
      await video.value.play()
      state.value = 'looking'
      look(decode)
    }
    catch (error) {
      letGo()
      if (!gone) state.value = stateOf(error)
    }
  }

  function look(decode: (from: HTMLVideoElement) => Promise<string[]>) {
    timer = setTimeout(async () => {
      const texts = video.value && video.value.readyState >= 2 ? await decode(video.value).catch(() => []) : []
      if (gone || !stream) return
      if (texts.length > 0) seen(texts)
      look(decode)
    }, pause)
  }

  onMounted(start)
  onBeforeUnmount(() => {
    gone = true
    letGo()
  })
  return { state, start }
}
