import { FetchError } from 'ofetch'
import type { TagFound } from '#shared/schemas/tag'
import { readTagCode } from '#shared/tag-code'
import { readScanned } from '#shared/scan'
import type { Scanned } from '#shared/scan'
import { scanWords, shortly } from '#shared/words/scan'
import { tagMistake } from '#shared/words/tags'

/** What was found and is ours: a shelf or carrier, or a piece. */
export type Found = Extract<TagFound, { kind: 'place' | 'carrier' }> | { kind: 'piece', id: number }

/** What the sheet says of the last code, with a way on where there is one. */
interface Said { text: string, to?: string }

const keyOf = (scanned: Scanned) => (scanned.kind === 'tag' ? scanned.code : scanned.kind === 'piece' ? `piece ${scanned.id}` : scanned.text)

/** A code that leads nowhere is refused in the server's own sentence. */
const refusalOf = (error: unknown) => (error instanceof FetchError && typeof error.data?.data?.message === 'string' ? error.data.data.message as string : scanWords.unreached)

/** Whose address a piece's tag may lead to: this page's, or the one that the installation prints on tags. */
async function isOurs(host: string): Promise<boolean> {
  if (host === location.host) return true
  const { address } = await callApi<{ address: string | null }>('/api/tags')
  return address !== null && new URL(address).host === host
}

/**
 * From what the camera sees or a hand typed to what it is. A code in sight is asked about once.
 * @param found takes what is ours; a sentence it returns is why it is of no use here
 */
export function useScan(found: (what: Found) => string | null) {
  const said = ref<Said | null>(null)
  const choices = ref<Scanned[]>([])
  const asking = ref(false)
  let last = ''

  async function lookUp(scanned: Scanned): Promise<Said | null> {
    if (scanned.kind === 'foreign') return { text: scanWords.foreign(shortly(scanned.text)) }
    if (scanned.kind === 'piece' && !await isOurs(scanned.host)) return { text: scanWords.otherHost(scanned.host) }
    const what: TagFound | Found = scanned.kind === 'piece' ? scanned : await callApi<TagFound>(`/api/tags/${scanned.code}`)
    if (what.kind === 'elsewhere') return { text: scanWords.elsewhere(what.studio), to: `/tag/${keyOf(scanned)}` }
    const refusal = found(what)
    return refusal === null ? null : { text: refusal }
  }

  async function take(scanned: Scanned) {
    if (asking.value) return
    asking.value = true
    choices.value = []
    try {
      said.value = await lookUp(scanned)
    }
    catch (error) {
      said.value = { text: refusalOf(error) }
    }
    asking.value = false
  }

  /** What the camera sees. Several of ours at once are a question; beside one of ours another's code counts for nothing. */
  function seen(texts: readonly string[]) {
    const all = [...new Map(texts.map(text => readScanned(text)).map(each => [keyOf(each), each])).values()]
    const ours = all.filter(each => each.kind !== 'foreign')
    const wanted = ours.length > 0 ? ours : all.slice(0, 1)
    const sight = wanted.map(keyOf).sort().join(' ')
    if (sight === last || asking.value) return
    last = sight
    if (wanted.length > 1) {
      choices.value = wanted
      said.value = null
    }
    else if (wanted[0]) void take(wanted[0])
  }

  /** @returns the sentence that says what is wrong with the letters, or null */
  function typed(letters: string): string | null {
    const read = readTagCode(letters)
    if (!('code' in read)) return tagMistake(read)
    last = read.code
    void take({ kind: 'tag', code: read.code })
    return null
  }

  return { said, choices, asking, take, seen, typed, keyOf }
}
