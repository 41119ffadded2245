import QrCode from 'qrcode'
import { clockTime, dateText } from '#shared/time'
import type { Paper } from '#shared/tag-sheet'
import { papers, qrMm, qrSquareMm } from '#shared/tag-sheet'
import { printWords } from '#shared/words/tags'

const loopback = /^(localhost|127\.|\[::1\])/

/** What every page that prints needs: the paper, where the codes lead, and the print itself. */
export function usePrinting(address: () => string | null, { offered = papers, page = 'tags' }: { offered?: readonly Paper[], page?: 'tags' | 'card' } = {}) {
  const route = useRoute()
  const url = useRequestURL()
  const { clock } = useStudioClock()
  const { can } = useSession()
  const asked = offered.find(each => each === route.query.paper)
  const paper = ref<Paper>(asked ?? offered[0] ?? 'a4')
  // On the body: whatever stands beside the sheets, though it is nothing, would else be a sheet of another size after them.
  useHead({ bodyAttrs: { class: computed(() => `print-${page === 'card' ? 'card-' : ''}${paper.value}`) } })
  const options = offered.map(value => ({ value, label: printWords.papers[value] }))
  const origin = computed(() => address() ?? url.origin)
  const warning = computed(() => loopback.test(new URL(origin.value).host) ? printWords.loopback(origin.value, can('change settings')) : null)
  const day = (at: number) => dateText(at, clock.value)
  const time = (at: number) => clockTime(at, clock.value)
  const square = (text: string) => Math.round(100 * qrSquareMm(QrCode.create(text, { errorCorrectionLevel: 'M' }).modules.size)) / 100
  const scale = (labels: readonly { url: string }[], sheets: number) => printWords.scale(labels.length, sheets, String(qrMm), String(labels[0] ? square(labels[0].url) : 0))
  return { paper, options, origin, warning, day, time, scale, print: () => window.print() }
}
