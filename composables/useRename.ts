import { piecesWords } from '#shared/words/pieces'

/** Another name for a piece or a batch, and the way back: the name before. */
export function useRename(after: () => Promise<unknown>) {
  const { busy, message, fields, submit } = useSubmit()
  const done = shallowRef<{ path: string, was: string, name: string } | null>(null)

  async function send(path: string, name: string): Promise<boolean> {
    const answer = await submit(() => callApi<{ was: string }>(path, { method: 'PATCH', body: { name } }))
    if (!answer) return false
    done.value = answer.was === name ? null : { path, was: answer.was, name }
    await after()
    return true
  }
  async function undo() {
    const last = done.value
    if (last && await send(last.path, last.was)) done.value = null
  }
  const says = computed(() => (done.value ? piecesWords.renamed(done.value.was, done.value.name) : ''))
  return { busy, message, fields, says, undo, renamePiece: (id: number, name: string) => send(`/api/pieces/${id}`, name), renameBatch: (id: number, name: string) => send(`/api/batches/${id}`, name), putAway: () => { done.value = null } }
}
