/** One line of the table. `measured` is a sentence of figures; `met`: bar kept, null when the row has none. */
export interface Row { measure: string, bar: string, aim: string, measured: string, met: boolean | null }

export const percent = (value: number, digits = 2) => `${(value * 100).toFixed(digits)} %`

export const middle = (values: readonly number[]) => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? 0

/** Table in Markdown. */
export function tableOf(rows: readonly Row[]): string {
  const line = (cells: readonly string[]) => `| ${cells.join(' | ')} |`
  const verdict = ({ met }: Row) => (met === null ? '' : met ? 'yes' : 'no')
  return [line(['measure', 'bar', 'aim', 'measured', 'bar kept']), line(Array.from({ length: 5 }, () => '---')), ...rows.map(row => line([row.measure, row.bar, row.aim, row.measured, verdict(row)]))].join('\n')
}
