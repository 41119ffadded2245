/** The closed lists of words of the trade: what the database checks, the forms offer and the messages say. */
export const roles = ['owner', 'maker', 'helper'] as const
export type Role = typeof roles[number]

export const placeKinds = ['shelf', 'rail', 'hook', 'turntable', 'rack', 'clamps', 'press', 'bench', 'booth', 'drying cabinet', 'floor'] as const
export type PlaceKind = typeof placeKinds[number]

export const stepKinds = ['coat', 'glue-up', 'light sanding', 'flat sanding', 'levelling', 'turn over', 'bench work', 'packing'] as const
export type StepKind = typeof stepKinds[number]

export const coatSizes = ['thin', 'normal', 'full', 'flood'] as const
export type CoatSize = typeof coatSizes[number]

export const grounds = ['porous', 'primed', 'sealed', 'non-absorbent'] as const
export type Ground = typeof grounds[number]

export const drivers = ['water', 'joint', 'solvent', 'oxidation', 'reaction', 'coalescence', 'moisture', 'gel'] as const
export type Driver = typeof drivers[number]

export const milestoneNames = ['set-to-touch', 'dust-free', 'tack-free', 'at-tack', 'dry-to-handle', 'dry-to-sand-lightly', 'dry-to-sand-flat', 'ready-to-recoat', 'out-of-clamps', 'full-strength', 'cured'] as const
export type MilestoneName = typeof milestoneNames[number]

export const risks = ['likely', 'p90', 'p98'] as const
export type Risk = typeof risks[number]

export const dustClasses = ['none', 'some', 'much'] as const
export type DustClass = typeof dustClasses[number]

export const stepStatuses = ['waiting', 'doing', 'resting', 'done', 'set aside', 'left out'] as const
export type StepStatus = typeof stepStatuses[number]

export const stepOrigins = ['schedule', 'recovery', 'branch', 'unplanned'] as const
export type StepOrigin = typeof stepOrigins[number]

export const turnKinds = ['work', 'check', 'release'] as const
export type TurnKind = typeof turnKinds[number]

export const turnStatuses = ['waiting', 'doing', 'done', 'left out'] as const
export type TurnStatus = typeof turnStatuses[number]

export const holds = ['clamps', 'press', 'weight'] as const
export type Hold = typeof holds[number]

export const coatKinds = ['coat', 'glue-up'] as const
export type CoatKind = typeof coatKinds[number]

export const doubtCauses = ['chilled', 'failed', 'unknown'] as const
export type DoubtCause = typeof doubtCauses[number]

export const airNoteKinds = ['sun', 'shade', 'warm air', 'moving', 'covered'] as const
export type AirNoteKind = typeof airNoteKinds[number]

export const readingSources = ['note', 'words', 'same', 'file', 'sensor', 'weather'] as const
export type ReadingSource = typeof readingSources[number]

export const actors = ['member', 'bench', 'sensor', 'system'] as const
export type Actor = typeof actors[number]

export const actKinds = ['batch started', 'began', 'coat on', 'glue-up on', 'not on yet', 'it is out', 'work done', 'turned over', 'check done', 'touch test', 'stripped', 'moved', 'not there', 'seen', 'set aside', 'resumed', 'left out', 'dropped out', 'rejoined', 'enough', 'window missed', 'air', 'intake answered', 'room opened', 'rags answered', 'gone', 'back', 'regrouped', 'cancelled'] as const
export type ActKind = typeof actKinds[number]

/** What became of a piece that is not here any more. */
export const goneWays = ['sold', 'given away', 'lost', 'discarded'] as const
export type GoneWay = typeof goneWays[number]

/** When in a step's life a photograph was taken. */
export const photoMoments = ['before', 'after'] as const
export type PhotoMoment = typeof photoMoments[number]

export const callKinds = ['last moment to start', 'ready', 'before you leave', 'check the room', 'promise slipping', 'rags', 'vapour'] as const
export type CallKind = typeof callKinds[number]

/** What moves a promised date: drying slower than counted on, coats done again, work that takes longer, hours that do not reach the bench, and waiting for hands that are busy. */
export const promiseCauses = ['drying', 'rework', 'minutes', 'hours', 'waiting'] as const
export type PromiseCause = typeof promiseCauses[number]

/** Calls about fire: nobody can switch them off, and no quiet hour holds them. */
export const fireCallKinds = ['rags', 'vapour'] as const satisfies readonly CallKind[]

/** Old objects are asked about these once; what nobody has tested counts as there. */
export const intakeQuestions = ['lead', 'green cloth', 'mould', 'metal coating'] as const
export type IntakeQuestion = typeof intakeQuestions[number]

/** Whether the exhaust runs when solvent work begins. */
export const exhaustAnswers = ['running', 'none'] as const
export type ExhaustAnswer = typeof exhaustAnswers[number]

/** How a room's air is moved: what its mixing factor rests on. */
export const airMoves = ['measured fan', 'fan and windows', 'windows only'] as const
export type AirMove = typeof airMoves[number]

/** What only an owner can state, in writing. */
export const statementKinds = ['isocyanate'] as const
export type StatementKind = typeof statementKinds[number]

export const channels = ['push', 'mail'] as const
export type Channel = typeof channels[number]

export const ragAnswers = ['flat outdoors', 'in water can', 'not dealt with'] as const
export type RagAnswer = typeof ragAnswers[number]

/** What somebody answers to a piece of advice about a coat. The last three are about haze. */
export const adviceAnswers = ['seen', 'waiting', 'going on', 'haze'] as const
export type AdviceAnswer = typeof adviceAnswers[number]

export const reminderStatuses = ['due', 'claimed', 'sent', 'answered', 'withdrawn'] as const
export const deliveryStatuses = ['queued', 'sending', 'accepted', 'unknown', 'gone', 'failed'] as const
export const planStatuses = ['optimal', 'feasible', 'infeasible'] as const
export const sourceKeys = ['S', 'S-', 'M', 'CP', 'calc', 'planning value', 'own'] as const
export type SourceKey = typeof sourceKeys[number]

/** What the parts of a mix are measured by. */
export const mixBases = ['weight', 'volume'] as const
export type MixBasis = typeof mixBases[number]
