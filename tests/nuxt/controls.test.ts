import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it } from 'vitest'
import BaseButton from '~/components/base/BaseButton.vue'
import BaseField from '~/components/base/BaseField.vue'
import BaseNumber from '~/components/base/BaseNumber.vue'
import TimeKeys from '~/components/base/TimeKeys.vue'
import { controlWords } from '#shared/words/controls'

describe('a field', () => {
  it('says what was wrong where a screen reader looks for it, and keeps what was typed', async () => {
    const field = await mountSuspended(BaseField, { props: { modelValue: 'half a na', label: 'Name', error: 'Give the room a name.' } })
    const input = field.get('input')
    const error = field.get(`#${CSS.escape(input.attributes('aria-describedby')?.split(' ').at(-1) ?? '')}`)
    expect(error.text()).toContain('Give the room a name.')
    expect(input.attributes('aria-invalid')).toBe('true')
    expect(input.element.value).toBe('half a na')
  })
})

describe('a stepper', () => {
  it('is empty until somebody presses, and then starts where it was told to', async () => {
    const stepper = await mountSuspended(BaseNumber, { props: { modelValue: null, label: 'Humidity', startAt: 50, unit: '%' } })
    expect(stepper.get('input').element.value).toBe('')
    await stepper.get('button:last-of-type').trigger('click')
    expect(stepper.emitted('update:modelValue')?.at(-1)).toEqual([50])
  })

  it('takes a decimal comma', async () => {
    const stepper = await mountSuspended(BaseNumber, { props: { modelValue: null, label: 'Temperature' } })
    await stepper.get('input').setValue('19,5')
    expect(stepper.emitted('update:modelValue')?.at(-1)).toEqual([19.5])
  })
})

describe('the time keys', () => {
  const now = Date.parse('2026-04-07T12:00:00Z')

  it('answer in minutes ago', async () => {
    const keys = await mountSuspended(TimeKeys, { props: { modelValue: { kind: 'ago', minutes: 0 }, zone: 'UTC', now } })
    await keys.get('input[aria-label="20 min ago"]').setValue(true)
    expect(keys.emitted('update:modelValue')?.at(-1)).toEqual([{ kind: 'ago', minutes: 20 }])
  })

  it('give no answer while "other" has no good time, and say what is wanted', async () => {
    const keys = await mountSuspended(TimeKeys, { props: { modelValue: { kind: 'ago', minutes: 0 }, zone: 'UTC', now } })
    await keys.get(`input[aria-label="${controlWords.timeOther}"]`).setValue(true)
    expect(keys.emitted('update:modelValue')?.at(-1)).toEqual([null])
    await keys.get('input[type="time"]').setValue('13:30')
    expect(keys.text()).toContain(controlWords.timeWrong)
    await keys.get('input[type="time"]').setValue('11:30')
    expect(keys.emitted('update:modelValue')?.at(-1)).toEqual([{ kind: 'at', at: Date.parse('2026-04-07T11:30:00Z') }])
  })

  it('blame the day, not the time, where the day is to come or too long ago', async () => {
    const keys = await mountSuspended(TimeKeys, { props: { modelValue: { kind: 'at', at: now }, zone: 'UTC', now } })
    for (const day of ['2026-04-08', '2026-03-01']) {
      await keys.get('input[type="date"]').setValue(day)
      expect(keys.text()).toContain(controlWords.dayWrong(14))
      expect(keys.text()).not.toContain(controlWords.timeWrong)
      expect(keys.emitted('update:modelValue')?.at(-1)).toEqual([null])
    }
    await keys.get('input[type="date"]').setValue('2026-04-06')
    expect(keys.text()).not.toContain(controlWords.dayWrong(14))
    expect(keys.emitted('update:modelValue')?.at(-1)).toEqual([{ kind: 'at', at: Date.parse('2026-04-06T12:00:00Z') }])
  })
})

describe('a key with a reason against it', () => {
  it('does nothing and says why', async () => {
    const key = await mountSuspended(BaseButton, { props: { why: 'Choose a piece first.' }, slots: { default: () => 'It is on' } })
    await key.get('button').trigger('click')
    expect(key.emitted('press')).toBeUndefined()
    expect(key.text()).toContain('Choose a piece first.')
  })
})
