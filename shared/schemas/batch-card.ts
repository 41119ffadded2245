import type { ScheduleDetailWire } from '#shared/schemas/schedule'

/** GET /api/batches/[id]/card: what the paper twin of a batch and the tags of its pieces are printed from. Instants are ms UTC. */
export interface BatchCardState {
  at: number
  id: number
  name: string
  studio: string
  /** Where people reach this installation, when a setting says so. */
  address: string | null
  startedAt: number
  order: { name: string, dueAt: number | null } | null
  pieces: { id: number, name: string, cautions: string[] }[]
  /** The edition the batch was started with. */
  schedule: ScheduleDetailWire | null
  /** Keys of the cautions to mind at each step, by the step's key. */
  stepCautions: Record<string, string[]>
}
