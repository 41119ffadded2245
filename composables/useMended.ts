import type { Ref } from 'vue'

/**
 * Takes a field's sentence away once what was typed there has changed and is wrong no longer, without waiting for the next press.
 * What only the server can judge counts as mended when it has changed.
 * @param valueOf what a field's sentence is about, as it is typed now
 * @param wrongNow the sentences by field that the form itself would give now
 */
export function useMended({ fields, message }: { fields: Ref<Record<string, string>>, message: Ref<string | null> }, valueOf: (field: string) => unknown, wrongNow: () => Record<string, string>) {
  const typed = (field: string) => JSON.stringify(valueOf(field)) ?? ''
  let stood = new Map<string, string>()
  watch(fields, now => void (stood = new Map(Object.keys(now).map(field => [field, typed(field)]))), { flush: 'sync' })
  watch(() => Object.keys(fields.value).map(typed).join('\n'), () => {
    const wrong = wrongNow()
    const was = Object.entries(fields.value)
    const left = was.flatMap(([field, says]): [string, string][] => {
      if (typed(field) === stood.get(field)) return [[field, says]]
      const still = wrong[field]
      return still === undefined ? [] : [[field, still]]
    })
    if (left.length === was.length && left.every(([field, says]) => fields.value[field] === says)) return
    // The sentence at the key is one of the fields': it goes with its own, and says the next one that is left.
    message.value = left.some(([, says]) => says === message.value) ? message.value : left[0]?.[1] ?? null
    fields.value = Object.fromEntries(left)
  })
}
