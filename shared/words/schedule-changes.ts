import type { ScheduleChange, StepField } from '#shared/schedules/changes'

const fields: Record<StepField, string> = {
  'name': 'name', 'kind': 'kind', 'material': 'material', 'faces': 'what it works on', 'size': 'size of coat', 'ground': 'ground', 'held': 'what holds it', 'place': 'place',
  'round': 'how often', 'minutes': 'minutes', 'hands': 'pairs of hands', 'dust': 'dust', 'checks': 'checks', 'run over': 'may run over',
}

/** One difference between two editions as a line: "Second coat: material, minutes". */
export function changeText(change: ScheduleChange): string {
  switch (change.code) {
    case 'summary': return 'What it is for'
    case 'order': return 'The order of the steps'
    case 'part added': return `New part: ${change.of}`
    case 'part gone': return `Part taken out: ${change.of}`
    case 'part changed': return `Part changed: ${change.of}`
    case 'step added': return `New step: ${change.of}`
    case 'step gone': return `Step taken out: ${change.of}`
    case 'step changed': return change.fields.includes('name') ? `${change.was} is now ${change.of}${change.fields.length > 1 ? `: ${change.fields.filter(field => field !== 'name').map(field => fields[field]).join(', ')}` : ''}` : `${change.of}: ${change.fields.map(field => fields[field]).join(', ')}`
    case 'wait added': return `“${change.of}” waits for “${change.after}” now`
    case 'wait gone': return `“${change.of}” waits for “${change.after}” no more`
    case 'wait changed': return `What “${change.of}” waits for after “${change.after}”`
  }
}
