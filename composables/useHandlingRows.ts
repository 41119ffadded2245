import { useElementSize } from '@vueuse/core'
import type { ShallowRef } from 'vue'
import type { StudioState } from '#shared/schemas/piece-state'
import { handlingSheet } from '#shared/sheet'
import { shelfLines } from '#shared/sheet-pages'
import type { Clock } from '#shared/time'
import type { ReadPiece } from '#shared/verdict/piece'

interface Shown { state: StudioState, pieces: readonly ReadPiece[], clock: Clock, roomId: number | null }

/**
 * What may be handled, in rows of as many shelves as the box is wide for.
 * @param least px that a column needs
 * @param usual px that the box is taken for before it is measured
 */
export function useHandlingRows(props: Shown, box: Readonly<ShallowRef<HTMLElement | null>>, least: number, usual: number) {
  const sheet = computed(() => handlingSheet(props.state, props.pieces, props.clock, props.roomId))
  const { width } = useElementSize(box, { width: usual, height: 0 })
  const columns = computed(() => Math.max(1, Math.floor(width.value / least)))
  const rows = computed(() => shelfLines(sheet.value.shelves, columns.value).map(line => ({ key: line.map(({ shelf, from }) => `${shelf.key}-${from}`).join(' '), line })))
  return { sheet, columns, rows }
}
