import { readTagCode } from '#shared/tag-code'

/** What a code in a picture says: a tag of a shelf or carrier, the tag of a piece with the host it leads to, or something that is none of ours. */
export type Scanned = { kind: 'tag', code: string } | { kind: 'piece', id: number, host: string } | { kind: 'foreign', text: string }

/** Reads what a code says. A tag's own letters are a tag without an address too. */
export function readScanned(text: string): Scanned {
  const said = text.trim()
  const [, host = '', path = ''] = /^https?:\/\/([^/?#]+)([^?#]*)$/i.exec(said) ?? []
  const tag = readTagCode(host === '' ? said : /^\/tag\/([^/]+)$/.exec(path)?.[1] ?? '')
  if ('code' in tag) return { kind: 'tag', code: tag.code }
  const piece = /^\/pieces\/([1-9]\d{0,9})$/.exec(path)?.[1]
  return piece === undefined ? { kind: 'foreign', text: said } : { kind: 'piece', id: Number(piece), host: host.toLowerCase() }
}
