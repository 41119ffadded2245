import { callWords } from '#shared/words/calls'

/** What a push carries. */
export interface PushPayload { title: string, body: string, path: string, tag: string }

interface Action { action: string, title: string }

export interface Notice { title: string, options: { body: string, tag: string, data: { path: string }, requireInteraction: boolean, actions: Action[] } }

const words = callWords.notification

/** Only a page of our own: a push that was tampered with must not lead elsewhere. */
function ownPath(path: unknown): string {
  return typeof path === 'string' && /^\/(?![/\\])/.test(path) ? path : '/'
}

/**
 * Reads a push. One that cannot be read is still shown, since a browser takes the right to push away from a worker
 * that stays silent; it says to look at the board.
 */
export function readPush(text: string | null): PushPayload {
  try {
    const { title, body, path, tag } = JSON.parse(text ?? '') as Partial<Record<keyof PushPayload, unknown>>
    if (typeof title === 'string' && typeof body === 'string' && typeof tag === 'string') return { title, body, path: ownPath(path), tag }
  }
  catch {
    // Falls through to the sentence for a push without words.
  }
  return { title: words.unreadableTitle, body: words.unreadableBody, path: '/', tag: 'unreadable' }
}

function actionsFor(path: string): Action[] {
  const query = new URL(path, 'https://studio.invalid').searchParams
  if (query.has('rags')) return [{ action: 'flat-outdoors', title: words.flatOutdoors }, { action: 'in-water-can', title: words.inWaterCan }]
  if (query.get('act') === 'coat') return [{ action: 'coat-on', title: words.coatOn }, { action: 'still-tacky', title: words.stillTacky }]
  return query.has('turn') ? [{ action: 'dry-enough', title: words.dryEnough }, { action: 'still-tacky', title: words.stillTacky }] : []
}

/** The notification of a push. The tag is the delivery's stable id, so that a repeat replaces itself. */
export function noticeFor({ title, body, path, tag }: PushPayload): Notice {
  return { title, options: { body, tag, data: { path }, requireInteraction: /[?&](rags|start)=/.test(path), actions: actionsFor(path) } }
}

/** The page that a press opens. A key says what to ask there; nothing is recorded before the page has asked. */
export function pathAfter(data: unknown, action: string): string {
  const path = ownPath((data as { path?: unknown } | null)?.path)
  if (!action) return path
  return `${path}${path.includes('?') ? '&' : '?'}say=${encodeURIComponent(action)}`
}
