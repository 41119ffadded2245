import { dark, light } from '../assets/look/palette'
import { untoldShelves } from '#shared/untold-shelves'
import { unreachedWords as words } from '#shared/words/unreached'

/** How often the page looks whether the studio is there again, ms. */
const tryMs = 10_000
/** Stands in a sentence for what only the page knows. */
const gap = '%'

interface Known { noTaps: string, oneTap: string, taps: string, tried: string, gap: string, shelves: string[], tryMs: number }

/**
 * The script of the page. It is sent as its own source text, so it uses nothing but what it is given and what every browser has.
 * Whatever answers, however ill, is reached: the page itself says better what is wrong then.
 */
function watchStudio(page: Pick<typeof globalThis, 'fetch' | 'setInterval'> & { document: PageDocument, localStorage: PageStorage, location: { reload: () => void }, addEventListener: (name: string, then: () => void) => void }, known: Known): void {
  const say = (id: string, text: string) => {
    const line = page.document.getElementById(id)
    if (line) line.textContent = text
  }
  const countOf = (shelf: string): number => {
    try {
      const acts: unknown = JSON.parse(page.localStorage.getItem(shelf) ?? '[]')
      return Array.isArray(acts) ? acts.length : 0
    }
    catch {
      return 0
    }
  }
  const tried = () => say('tried', known.tried.replace(known.gap, new Date().toLocaleTimeString('en-GB')))
  const count = known.shelves.reduce((sum, shelf) => sum + countOf(shelf), 0)
  const look = () => page.fetch('/favicon.svg', { method: 'HEAD', cache: 'no-store' }).then(() => page.location.reload(), tried)
  say('taps', count === 0 ? known.noTaps : count === 1 ? known.oneTap : known.taps.replace(known.gap, String(count)))
  tried()
  page.document.getElementById('again')?.addEventListener('click', () => void look())
  page.addEventListener('online', () => void look())
  page.setInterval(() => void look(), known.tryMs)
}

/** What of a page the script touches: a worker's types know no page. */
interface PageDocument { getElementById: (id: string) => { textContent: string | null, addEventListener: (name: string, then: () => void) => void } | null }
interface PageStorage { getItem: (name: string) => string | null }

const style = `
:root { color-scheme: light dark; --paper: ${light.gesso}; --ink: ${light.ink}; }
@media (prefers-color-scheme: dark) { :root { --paper: ${dark.gesso}; --ink: ${dark.ink}; } }
body { margin: 0; padding: 1.5rem 1rem; background: var(--paper); color: var(--ink); font: 1.125rem/1.5 system-ui, sans-serif; }
main { max-width: 36rem; margin: 0 auto; }
h1 { font-size: 1.75rem; line-height: 1.2; }
button { min-height: 88px; padding: 0 1.5rem; border: 2px solid var(--ink); border-radius: 4px; background: var(--ink); color: var(--paper); font: inherit; font-weight: 700; }
button:focus-visible { outline: 3px solid var(--ink); outline-offset: 3px; }
`

/** The page as it is sent: made here whole, so that nothing of the studio is kept for it. */
export function unreachedPage(nonce: string): Response {
  const known: Known = { noTaps: words.taps(0), oneTap: words.taps(1), taps: words.taps(gap), tried: words.tried(gap), gap, shelves: [untoldShelves.own.acts, untoldShelves.bench.acts], tryMs }
  const html = `<!doctype html><html lang="en-GB"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1"><title>${words.title} · Stillwet</title><style nonce="${nonce}">${style}</style></head>
<body><main><h1>${words.title}</h1><p>${words.says}</p><p><b id="taps"></b></p><p id="tried" role="status"></p><button id="again" type="button">${words.again}</button></main>
<script nonce="${nonce}">(${watchStudio.toString()})(window, ${JSON.stringify(known).replaceAll('<', '\\u003c')})</script></body></html>`
  return new Response(html, { status: 503, headers: {
    'content-type': 'text/html; charset=utf-8', 'cache-control': 'no-store',
    'content-security-policy': `default-src 'none'; script-src 'nonce-${nonce}'; style-src 'nonce-${nonce}'; connect-src 'self'; img-src 'self'; base-uri 'none'; form-action 'none'; frame-ancestors 'none'`,
  } })
}

/** Answers whoever opens or reloads a page while no line leads to the studio with a page of our own. Everything else goes its usual way. */
export function standIn(scope: ServiceWorkerGlobalScope) {
  scope.addEventListener('fetch', (event) => {
    const { mode, method } = event.request
    if (mode !== 'navigate' || method !== 'GET') return
    event.respondWith(fetch(event.request).catch(() => unreachedPage(crypto.randomUUID())))
  })
}
