import { mailService } from '../../helpers/mailReceiver'
import { pushService } from '../../helpers/pushReceiver'

/** One thing that arrived: under which id, at which endpoint (a browser's path, or 'mail'), and the page it opens. */
export interface Arrival { id: string, endpoint: string, page: string }

const pageIn = (text: string) => /\/hands\?[^\s"]+/.exec(text)?.[0] ?? ''

/** Receivers that take `lagMs()` over every answer, so that a sender can be killed while one is still owed. */
export async function slowReceivers(lagMs: () => number) {
  const watchers = new Set<(text: string) => void>()
  const linger = (text: string) => {
    for (const watch of watchers) watch(text)
    return new Promise<void>(resolve => setTimeout(resolve, lagMs()))
  }
  const push = await pushService(async (_path, text) => {
    await linger(text)
    return 201
  })
  const mail = await mailService({ onMail: () => linger('') })

  /** Resolves true when a push with such a text has come in and is not answered yet; false when none does within `ms`. */
  const inHand = (wanted: RegExp, ms: number) => new Promise<boolean>((resolve) => {
    const end = (found: boolean) => {
      clearTimeout(timer)
      watchers.delete(watch)
      resolve(found)
    }
    const watch = (text: string) => {
      if (wanted.test(text)) end(true)
    }
    const timer = setTimeout(() => end(false), ms)
    watchers.add(watch)
  })

  const arrivals = (): Arrival[] => [
    ...push.received.map(({ path, headers, text }) => ({ id: String(headers.topic), endpoint: path, page: pageIn(text) })),
    ...mail.received.map(({ messageId, source }) => ({ id: messageId.split('@')[0] ?? '', endpoint: 'mail', page: pageIn(source.replaceAll('=\r\n', '').replaceAll('=3D', '=')) })),
  ]
  const close = async () => {
    await push.close()
    await mail.close()
  }
  return { push, mailPort: mail.port, inHand, arrivals, close }
}

export type Receivers = Awaited<ReturnType<typeof slowReceivers>>
