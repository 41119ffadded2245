/** Where a dragged place would come: before the one that stands at `index` in the room without it. */
export interface Drop { placeId: number, roomId: number, index: number }

/** So near to an edge of the window the page follows, px, by so much at each move. */
const edge = 72
const follows = 18

const middleOf = (element: Element) => {
  const { top, height } = element.getBoundingClientRect()
  return top + height / 2
}

/** The room under the pointer, or the one it is nearest to. */
function roomAt(y: number): HTMLElement | null {
  const away = (room: HTMLElement) => {
    const { top, bottom } = room.getBoundingClientRect()
    return y < top ? top - y : y > bottom ? y - bottom : 0
  }
  return [...document.querySelectorAll<HTMLElement>('[data-room]')].reduce<HTMLElement | null>((nearest, room) => (nearest === null || away(room) < away(nearest) ? room : nearest), null)
}

/** Drags a place over the drawing by its handle: the pointer says where it would come, letting go puts it there, Escape leaves it. */
export function useDragPlace(put: (drop: Drop) => void) {
  const drop = ref<Drop | null>(null)

  function over(placeId: number, y: number): Drop | null {
    const room = roomAt(y)
    if (!room) return null
    const others = [...room.querySelectorAll<HTMLElement>('[data-place]')].filter(each => each.dataset.place !== String(placeId))
    return { placeId, roomId: Number(room.dataset.room), index: others.filter(each => middleOf(each) < y).length }
  }

  function start(placeId: number, event: PointerEvent) {
    if (event.button !== 0 || !(event.currentTarget instanceof HTMLElement)) return
    const handle = event.currentTarget
    const from = event.clientY
    const move = (moved: PointerEvent) => {
      if (drop.value === null && Math.abs(moved.clientY - from) < 6) return
      drop.value = over(placeId, moved.clientY)
      if (moved.clientY < edge) window.scrollBy(0, -follows)
      else if (moved.clientY > window.innerHeight - edge) window.scrollBy(0, follows)
    }
    const end = (kept: boolean) => {
      handle.removeEventListener('pointermove', move)
      handle.removeEventListener('pointerup', up)
      handle.removeEventListener('pointercancel', cancel)
      document.removeEventListener('keydown', escape)
      const last = drop.value
      drop.value = null
      document.body.classList.remove('select-none')
      if (kept && last) put(last)
    }
    const up = () => end(true)
    const cancel = () => end(false)
    const escape = (pressed: KeyboardEvent) => {
      if (pressed.key === 'Escape') end(false)
    }
    // Else the page's words are marked along the way.
    document.body.classList.add('select-none')
    handle.setPointerCapture(event.pointerId)
    handle.addEventListener('pointermove', move)
    handle.addEventListener('pointerup', up)
    handle.addEventListener('pointercancel', cancel)
    document.addEventListener('keydown', escape)
  }

  return { drop, start }
}
