import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it } from 'vitest'
import { defineComponent, nextTick, reactive, ref } from 'vue'
import CautionList from '~/components/piece/CautionList.vue'
import { useMended } from '~/composables/useMended'
import { cautionDeferral, findCaution } from '#shared/library/cautions'

/** A form of two fields: one that the form judges itself, and one that only the server can. */
async function refusedForm() {
  const typed = reactive({ name: '', place: 'full' })
  const sending = { fields: ref<Record<string, string>>({}), message: ref<string | null>(null) }
  await mountSuspended(defineComponent({
    setup() {
      useMended(sending, field => typed[field as keyof typeof typed], (): Record<string, string> => (typed.name.length > 2 ? {} : { name: typed.name === '' ? 'Give it a name.' : 'Give it a longer name.' }))
      return () => null
    },
  }))
  sending.fields.value = { name: 'Give it a name.', place: 'That shelf is full.' }
  sending.message.value = 'Give it a name.'
  return { typed, sending }
}

describe('a refused form', () => {
  it('takes each sentence away when its field is mended, and keeps the others', async () => {
    const { typed, sending } = await refusedForm()
    typed.name = 'No'
    await nextTick()
    expect(sending.fields.value).toEqual({ name: 'Give it a longer name.', place: 'That shelf is full.' })
    typed.name = 'Nook'
    await nextTick()
    expect([sending.fields.value, sending.message.value]).toEqual([{ place: 'That shelf is full.' }, 'That shelf is full.'])
    typed.place = 'Shelf B'
    await nextTick()
    expect([sending.fields.value, sending.message.value]).toEqual([{}, null])
  })

  it('says again what is wrong again only when it is sent', async () => {
    const { typed, sending } = await refusedForm()
    typed.name = 'Nook'
    await nextTick()
    typed.name = ''
    await nextTick()
    expect(sending.fields.value).toEqual({ place: 'That shelf is full.' })
  })
})

describe('cautions on a page with much else to do', () => {
  const cautions = [{ key: 'dust mask', materials: ['Lacquer'] }, { key: 'flames', materials: ['Lacquer'] }, { key: 'children', materials: ['Lacquer'] }]
  it('stand open where they can burn or maim; the rest is counted and one press away', async () => {
    const shown = await mountSuspended(CautionList, { props: { cautions, folds: true } })
    const fold = shown.get('details')
    expect(fold.get('summary').text()).toBe('2 more cautions')
    expect(fold.text()).not.toContain(findCaution('flames')?.text)
    for (const { key } of cautions) expect(shown.text()).toContain(findCaution(key)?.text)
    expect(shown.text().split(cautionDeferral)).toHaveLength(2)
  })
  it('all stand open elsewhere', async () => {
    const shown = await mountSuspended(CautionList, { props: { cautions } })
    expect(shown.find('details').exists()).toBe(false)
    expect(shown.findAll('li')).toHaveLength(3)
  })
})
