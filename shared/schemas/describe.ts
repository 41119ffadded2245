import type { core } from 'zod/mini'

type Issue = core.$ZodIssue

const label = (issue: Issue) => {
  const names = issue.path.filter(part => typeof part === 'string')
  return names.length > 0 ? `"${names.join(' ')}"` : 'This'
}

const wordOf: Record<string, string> = { string: 'text', number: 'a number', int: 'a whole number', boolean: 'yes or no', array: 'a list', object: 'a group of fields', date: 'a date', null: 'empty' }

function describeSize(issue: Issue & { code: 'too_small' | 'too_big' }) {
  const isText = issue.origin === 'string'
  const unit = isText ? ' characters' : issue.origin === 'array' ? ' items' : ''
  const bound = issue.code === 'too_small' ? `at least ${issue.minimum}` : `at most ${issue.maximum}`
  return `${label(issue)} must ${unit ? 'have' : 'be'} ${bound}${unit}.`
}

/** One sentence naming the field and what was expected. A schema's own sentence wins over ours. */
function describeIssue(issue: Issue): string {
  if (issue.message && !issue.message.startsWith('Invalid')) return issue.message
  switch (issue.code) {
    case 'invalid_type': return `${label(issue)} must be ${wordOf[issue.expected] ?? issue.expected}.`
    case 'invalid_value': return `${label(issue)} must be one of: ${issue.values.map(String).join(', ')}.`
    case 'too_small':
    case 'too_big': return describeSize(issue)
    case 'unrecognized_keys': return `Not known here: ${issue.keys.join(', ')}.`
    default: return `${label(issue)} does not have the expected form.`
  }
}

/**
 * What a schema found, by field: `{ name: 'Give the room a name.' }`.
 * Keys are paths joined by dots ("hours.0.fromMin"); what belongs to no field lies under "form".
 */
export function describeIssues(issues: readonly Issue[]): Record<string, string> {
  const fields: Record<string, string> = {}
  for (const issue of issues) fields[issue.path.length > 0 ? issue.path.map(String).join('.') : 'form'] ??= describeIssue(issue)
  return fields
}
