import type { TellableKind } from '#shared/schemas/act'

/** What a bench tablet records without knowing who: everything else asks for a PIN. */
const benchKinds: readonly TellableKind[] = ['coat on', 'touch test', 'moved', 'it is out', 'seen']

export const needsPerson = (kind: TellableKind) => !benchKinds.includes(kind)

/** Whether a key of a tablet asks for a PIN first: its kind does, or it begins solvent work, which a named person answers for. */
export const asksForPin = (kind: TellableKind, solventBorne: boolean) => needsPerson(kind) || (solventBorne && (kind === 'coat on' || kind === 'glue-up on'))
