import type { CautionKey } from '#shared/library/cautions'
import type { IntakeQuestion } from '#shared/terms'

/** What each question about an old object warns of while it is not answered with "tested, none". */
export const intakeCautions: Record<IntakeQuestion, CautionKey> = { 'lead': 'old paint', 'green cloth': 'green cloth', 'mould': 'mould', 'metal coating': 'metal coating' }
