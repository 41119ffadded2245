/** What a committed change touched, so that a listener can let others' business pass. */
export type ChangeKind = 'work' | 'air' | 'places' | 'hours' | 'people' | 'settings' | 'library' | 'prediction' | 'plan' | 'calls' | 'photos'

export interface Change {
  studioId: number
  /** The studio's revision after the commit. */
  revision: number
  kind: ChangeKind
}

type Listener = (change: Change) => void

const listeners = new Set<Listener>()

/**
 * Calls `listener` after every committed change, in the order of registration, within the request that made it.
 * Whatever takes time belongs behind a timer of its own.
 * @returns a function that stops it
 */
export function onChange(listener: Listener): () => void {
  listeners.add(listener)
  return () => {
    listeners.delete(listener)
  }
}

/** Tells the listeners. A listener that fails is noted and does not undo what was recorded. */
export function announce(change: Change): void {
  for (const listener of [...listeners]) {
    try {
      listener(change)
    }
    catch (error) {
      console.error(`A listener failed on revision ${change.revision} of studio ${change.studioId}.`, error)
    }
  }
}
